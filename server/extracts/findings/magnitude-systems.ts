import type { Finding } from "#shared/api/extracts.ts";
import { isMagnitude } from "../suggest-magnitudes.ts";
import { vegaOffset } from "../vega-offsets.ts";
import { accept, ask, isAccepted, quoted } from "./finding.ts";
import { type Look, median, type UsedColumn } from "./look.ts";

const open = ({ used }: Look): Finding[] => {
  const cards = used
    .filter((u) => isMagnitude(u.card.means) && u.card.magnitudeSystem === null)
    .map((u) => u.card);
  if (cards.length === 0) return [];
  const isOne = cards.length === 1;
  return [
    ask(
      "magnitude-system",
      `The file does not say whether ${quoted(cards.map((c) => c.header))} ${isOne ? "is" : "are"} on the scale of Vega or of AB. In Ks they are ${vegaOffset("ks_mag").toFixed(2)} mag apart.`,
      isOne
        ? "Say which zero point it has."
        : "Say which zero point they have; where they differ, say it column by column in the plan below.",
      {
        column: isOne ? (cards[0]?.header ?? null) : null,
        count: cards.length,
        answers: [
          { value: "vega", label: "Vega" },
          { value: "ab", label: "AB" },
        ],
      },
    ),
  ];
};

const LEAST_SHARED = 5;
/** How near to the step between the systems the difference must be, mag; smaller steps are not told from colours. */
const NEAR = 0.15;
const LEAST_STEP = 0.3;

/** Against what other extracts say of the same stars: they are on the scale of Vega, as the catalogue keeps them. */
const mixed = (look: Look, u: UsedColumn): Finding[] => {
  const others = look.knowledge.shared?.values.get(u.card.means);
  if (!others || !isMagnitude(u.card.means) || u.card.magnitudeSystem === null) return [];
  const isAb = u.card.magnitudeSystem === "ab";
  const step = vegaOffset(u.card.means);
  const differences = [...u.values]
    .map((value, row) => value - (isAb ? step : 0) - (others[row] ?? Number.NaN))
    .filter((d) => Number.isFinite(d));
  const middle = median(differences);
  const isStep = Math.abs(step) >= LEAST_STEP && Math.abs(Math.abs(middle) - Math.abs(step)) <= NEAR;
  if (differences.length < LEAST_SHARED || !isStep) return [];
  if (isAccepted(look.plan, "magnitude-system-mixed", u.card.header)) return [];
  return [
    ask(
      "magnitude-system-mixed",
      `“${u.card.header}” and other extracts give ${u.meaning.label} for ${differences.length} shared stars and differ by ${Math.abs(middle).toFixed(2)} mag. That is the step between AB and Vega.`,
      "Say which zero point this file has.",
      {
        column: u.card.header,
        count: differences.length,
        answers: [
          isAb ? { value: "vega", label: "This file is Vega" } : { value: "ab", label: "This file is AB" },
          accept("It is right as it is"),
        ],
      },
    ),
  ];
};

/** Zero points of magnitudes: unknown, or another than in the other extracts. */
export const magnitudeSystemFindings = (look: Look): Finding[] => [
  ...open(look),
  ...look.used.flatMap((u) => mixed(look, u)),
];
