import type { Finding } from "#shared/api/extracts.ts";
import { conversionTo, unitChoices } from "#shared/units/units.ts";
import { unitOf } from "../cells.ts";
import { type Answers, accept, ask, isAccepted, said } from "./finding.ts";
import { columnOf, type Look, median, type UsedColumn } from "./look.ts";
import { type Slip, slipOf } from "./slips.ts";

const LEAST_SHARED = 5;
const LEAST_SHARE = 0.9;
/** Logarithm of 3 %: how sharp the ratio to the same stars elsewhere must be. */
const SHARP = 0.03;
const SCATTER = 0.1;

/** Quantities in which a factor can slip; magnitudes, logarithms and dates have none. */
const HAS_FACTOR = /^(?:ra|dec|pmra|pmdec|parallax|distance|teff|light_share)(?:_err)?$/;

/** Units that would put the numbers right: those whose step from the present one is the slip's. */
const remedies = ({ plan }: Look, { card, meaning }: UsedColumn, { factor }: Slip): Answers => {
  const now = conversionTo(meaning.unit, unitOf(card, plan))?.factor ?? 1;
  if (card.means === "ra" && Math.abs(factor - 1 / 15) < 1e-6) return [{ value: "hour", label: "Hours" }];
  if (card.means === "ra" && Math.abs(factor - 15) < 1e-6) return [{ value: "deg", label: "Degrees" }];
  return unitChoices(meaning.unit)
    .filter((unit) => {
      const other = conversionTo(meaning.unit, unit)?.factor ?? Number.NaN;
      return Math.abs((other / now) * factor - 1) < 1e-3;
    })
    .map((unit) => ({ value: `unit:${unit}`, label: unit || "pure numbers" }));
};

const askAboutSlip = (look: Look, u: UsedColumn, slip: Slip, message: string, count: number): Finding[] =>
  isAccepted(look.plan, "unit-slip", u.card.header)
    ? []
    : [
        ask(
          "unit-slip",
          message,
          "Look at the unit of the column. The numbers stay as they are until you say so.",
          {
            column: u.card.header,
            count,
            answers: [...remedies(look, u, slip), accept("The unit is right")],
          },
        ),
      ];

/** Against what other extracts say of the same stars. */
const againstOthers = (look: Look, u: UsedColumn): Finding[] => {
  const others = look.knowledge.shared?.values.get(u.card.means);
  if (!others || !HAS_FACTOR.test(u.card.means)) return [];
  const ratios = [...u.values]
    .map((value, row) => value / (others[row] ?? Number.NaN))
    .filter((ratio) => Number.isFinite(ratio) && ratio !== 0);
  const middle = median(ratios);
  const slip = ratios.length < LEAST_SHARED ? undefined : slipOf(middle, SHARP);
  if (!slip) return [];
  const close = ratios.filter((ratio) => Math.abs(ratio / middle - 1) <= SCATTER).length;
  if (close < ratios.length * LEAST_SHARE) return [];
  return askAboutSlip(
    look,
    u,
    slip,
    `“${u.card.header}” is ${slip.words} than in the other extracts for ${Math.round((close / ratios.length) * 100)} % of ${ratios.length} shared stars.`,
    ratios.length,
  );
};

const LEAST_STARS = 10;
/** Absolute magnitudes between which the middle star of any list lies (common practice, no source). */
const BRIGHTEST = -6;
const FAINTEST = 25;

/** Absolute magnitudes by parallax in mas and any magnitude of the file. */
const absoluteMagnitudes = (parallax: UsedColumn, magnitude: UsedColumn): number[] =>
  [...parallax.values]
    .map((mas, row) =>
      mas > 0 ? (magnitude.values[row] ?? Number.NaN) + 5 * Math.log10(mas / 1000) + 5 : Number.NaN,
    )
    .filter((m) => Number.isFinite(m));

/** Without other extracts: parallaxes that make giants of whole lists, or stars fainter than any. */
const byAbsoluteMagnitude = (look: Look): Finding[] => {
  const parallax = columnOf(look, "parallax");
  const magnitude = ["ks_mag", "g_mag", "j_mag", "v_mag"]
    .map((key) => columnOf(look, key))
    .find((u) => u !== undefined);
  if (!parallax || !magnitude) return [];
  const all = absoluteMagnitudes(parallax, magnitude);
  const middle = median(all);
  if (all.length < LEAST_STARS || (middle >= BRIGHTEST && middle <= FAINTEST)) return [];
  const isSmall = middle < BRIGHTEST;
  return askAboutSlip(
    look,
    parallax,
    { factor: isSmall ? 1 / 1000 : 1000, words: "" },
    `With “${parallax.card.header}” as it is read, half of the stars would be ${isSmall ? "brighter" : "fainter"} than M = ${said(Math.round(middle * 10) / 10)} in ${magnitude.meaning.label}, which no list of stars is. Numbers 1000 × ${isSmall ? "larger" : "smaller"} would be usual.`,
    all.length,
  );
};

/** Numbers that a slip of the unit has made too large or too small. */
export const slipFindings = (look: Look): Finding[] => {
  const compared = look.used
    .filter((u) => u.meaning.kind === "number")
    .flatMap((u) => againstOthers(look, u));
  const isKnown = compared.some((f) => f.column === columnOf(look, "parallax")?.card.header);
  return [...compared, ...(isKnown ? [] : byAbsoluteMagnitude(look))];
};
