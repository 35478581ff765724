import type { Finding } from "#shared/api/extracts.ts";
import { accept, ask, examplesAt, isAccepted, note, said } from "./finding.ts";
import { columnOf, type Look, rowsWhere, type UsedColumn } from "./look.ts";
import { RANGE_RULES, RANGE_RULES_VERSION, type RangeRule } from "./range-rules.ts";

/** More than this share outside is no outlier but another quantity or unit. */
const MANY = 0.2;

const outside = (look: Look, u: UsedColumn, { least, most, unit }: RangeRule): Finding[] => {
  const rows = rowsWhere(u, (v) => v < least || v > most);
  if (rows.length === 0 || isAccepted(look.plan, "out-of-range", u.card.header)) return [];
  const range = `${said(least)} to ${said(most)}${unit === "" ? "" : ` ${unit}`}`;
  const message = `${rows.length} of ${u.given.length} values looked at in “${u.card.header}” lie outside ${range}, where ${u.meaning.label} can be (rules ${RANGE_RULES_VERSION}).`;
  const about = {
    column: u.card.header,
    count: rows.length,
    examples: examplesAt(u.shown, look.lines, rows),
  };
  if (rows.length <= u.given.length * MANY || rows.length === 1)
    return [note("out-of-range", message, "Look at the rows below; they are kept as they are.", about)];
  return [
    ask("out-of-range", message, "Look at the unit and the meaning of the column.", {
      ...about,
      answers: [accept("The values are right"), { value: "means:kept", label: "Leave the column unused" }],
    }),
  ];
};

const errors = (look: Look, u: UsedColumn): Finding[] => {
  if (!u.card.means.endsWith("_err")) return [];
  const about = (rows: readonly number[]) => ({
    column: u.card.header,
    count: rows.length,
    examples: examplesAt(u.shown, look.lines, rows),
  });
  const [zero, negative] = [rowsWhere(u, (v) => v === 0), rowsWhere(u, (v) => v < 0)];
  return [
    ...(zero.length > 0
      ? [
          note(
            "error-zero",
            `${zero.length} errors looked at in “${u.card.header}” are exactly zero. That says that none was determined, so they are left blank.`,
            "Nothing needs to be done.",
            about(zero),
          ),
        ]
      : []),
    ...(negative.length > 0
      ? [
          note(
            "error-negative",
            `${negative.length} errors looked at in “${u.card.header}” are below zero. Such rows will be refused.`,
            "Say that the number is a mark for “no value” if it is one, or mend the file.",
            about(negative),
          ),
        ]
      : []),
  ];
};

const parallaxes = (look: Look): Finding[] => {
  const u = columnOf(look, "parallax");
  if (!u) return [];
  const rows = rowsWhere(u, (v) => v <= 0);
  const blanks = u.shown.texts.length - u.given.length;
  return [
    ...(rows.length > 0
      ? [
          note(
            "parallax-not-positive",
            `${rows.length} stars looked at have a parallax of zero or less. That is normal for faint stars. The measurement is kept, and gives no distance.`,
            "Nothing needs to be done.",
            { column: u.card.header, count: rows.length, examples: examplesAt(u.shown, look.lines, rows) },
          ),
        ]
      : []),
    ...(blanks > 0
      ? [
          note(
            "parallax-blank",
            `${blanks} stars looked at have no parallax.`,
            "Nothing needs to be done; they get a distance only where another column gives one.",
            { column: u.card.header, count: blanks },
          ),
        ]
      : []),
  ];
};

/** Values that a quantity cannot have, and those that are kept but lead nowhere. */
export const rangeFindings = (look: Look): Finding[] => [
  ...RANGE_RULES.flatMap((rule) => {
    const u = columnOf(look, rule.key);
    return u ? outside(look, u, rule) : [];
  }),
  ...look.used.flatMap((u) => errors(look, u)),
  ...parallaxes(look),
];
