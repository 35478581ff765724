import type { Finding } from "#shared/api/extracts.ts";
import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";
import { readHeader } from "../read-header.ts";
import { contradicts } from "../ucd.ts";
import { accept, ask, isAccepted, quoted, stop } from "./finding.ts";
import type { Look } from "./look.ts";

/** A column of the plan that the file or the catalogue does not have: nothing more can be said then. */
export const unknownMeanings = ({ plan, sample }: Pick<Look, "plan" | "sample">): Finding[] => {
  const unknown = plan.columns.filter(
    (c) => c.means !== KEPT && (!findMeaning(c.means) || c.index >= sample.header.length),
  );
  if (unknown.length === 0) return [];
  return [
    stop(
      "unknown-meaning",
      `${quoted(unknown.map((c) => c.header))}: the catalogue has no such quantity, or the file no such column.`,
      "Choose a quantity from the list.",
      { column: unknown[0]?.header ?? null, count: unknown.length },
    ),
  ];
};

const givenTwice = ({ used }: Look): Finding[] =>
  [...new Set(used.map((u) => u.card.means))].flatMap((key) => {
    const cards = used.filter((u) => u.card.means === key).map((u) => u.card);
    if (cards.length < 2) return [];
    return [
      stop(
        "meaning-twice",
        `${quoted(cards.map((c) => c.header))} are both said to give ${findMeaning(key)?.label}.`,
        "Let one of them give it and keep the others unused.",
        { column: cards[1]?.header ?? null, count: cards.length },
      ),
    ];
  });

const IDENTITY = ["source_id", "designation", "release"];

const nothingUsable = ({ used }: Look): Finding[] => {
  const means = new Set(used.map((u) => u.card.means));
  if (means.has("ra") !== means.has("dec"))
    return [
      stop(
        "half-a-position",
        "A position needs both RA and Dec, and only one of them is named.",
        "Say which column gives the other, or use neither.",
      ),
    ];
  const isNamed = means.has("source_id") || means.has("designation");
  const hasMore = [...means].some((key) => !IDENTITY.includes(key));
  if (means.has("ra") || (isNamed && hasMore)) return [];
  return [
    stop(
      "nothing-usable",
      "No columns were found that place or name a star: RA and Dec, or an identifier and at least one quantity.",
      "Say below which columns give them, or bring another file.",
    ),
  ];
};

/** Columns left unused because their UCD speaks against their name, where nothing else gives the quantity. */
const doubtful = ({ plan, sample, used }: Look): Finding[] => {
  const means = new Set(used.map((u) => u.card.means));
  return plan.columns.flatMap(({ header, index, means: chosen }) => {
    const column = sample.columns[index]?.column;
    const key = readHeader(header).key;
    if (chosen !== KEPT || !column || key === undefined || means.has(key)) return [];
    if (!contradicts(column.ucd, key) || isAccepted(plan, "meaning-doubtful", header)) return [];
    const label = findMeaning(key)?.label ?? key;
    return [
      ask(
        "meaning-doubtful",
        `“${header}” is spelled like ${label}, and its UCD, ${column.ucd}, says something else.`,
        `Say whether it gives ${label} or is to be left unused.`,
        {
          column: header,
          answers: [{ value: `means:${key}`, label: `It gives ${label}` }, accept("Leave it unused")],
        },
      ),
    ];
  });
};

/** What the columns are said to mean, taken together. */
export const meaningFindings = (look: Look): Finding[] => [
  ...givenTwice(look),
  ...nothingUsable(look),
  ...doubtful(look),
];
