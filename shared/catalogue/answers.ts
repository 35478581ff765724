import { type ColumnCard, type Finding, type ReadingPlan, readingPlan } from "../api/extracts.ts";

/**
 * What an answer to an Ask makes of the reading plan. Answers speak for themselves, whatever the finding:
 *
 * - `hour`, `deg`: what RA is in
 * - `blank:<text>`, `number:<text>`: whether a text of the column is a mark for no value
 * - `unit:<spelling>`: unit of the column
 * - `vega`, `ab`: zero point of the column's magnitudes, or of all that are open
 * - `with-cos`, `without-cos`: whether the column's motion is multiplied by the cosine of the declination
 * - `means:<key>`: what the column gives; `kept` leaves it unused
 * - `swap`: the two motions change places
 * - `axes:<year>`, `date:<year>`, `both:<year>`: equinox of the axes, date of the positions, or both at once
 * - `frame:ICRS`, `frame:galactic`, `frame:FK5/<equinox>`: frame of the positions
 * - `decimal:.`, `decimal:,`, `delimiter:;`, `encoding:latin1`: how the text is to be read
 * - `accept`: the file is taken as it is
 *
 * Where a value is typed it is the year (`epoch-missing`) or the unit (`unit-unknown`) itself.
 */
type Change = (plan: ReadingPlan, value: string, finding: Finding) => ReadingPlan;

const withCard = (
  plan: ReadingPlan,
  header: string | null,
  change: (card: ColumnCard) => Partial<ColumnCard>,
): ReadingPlan => ({
  ...plan,
  columns: plan.columns.map((card) => (card.header === header ? { ...card, ...change(card) } : card)),
});

const onCard =
  (change: (card: ColumnCard, value: string) => Partial<ColumnCard>): Change =>
  (plan, value, { column }) =>
    withCard(plan, column, (card) => change(card, value));

const added = (texts: readonly string[] | undefined, text: string): string[] => [
  ...(texts ?? []).filter((t) => t !== text),
  text,
];

const without = (texts: readonly string[] | undefined, text: string): string[] =>
  (texts ?? []).filter((t) => t !== text);

/** Under this name a plan keeps that a finding is accepted. */
export const acceptedKey = ({ code, column }: Pick<Finding, "code" | "column">): string =>
  column === null ? code : `${code}:${column}`;

const SWAPPED: Readonly<Record<string, string>> = {
  pmra: "pmdec",
  pmdec: "pmra",
  pmra_err: "pmdec_err",
  pmdec_err: "pmra_err",
};

const swap: Change = (plan) => ({
  ...plan,
  columns: plan.columns.map((card) => ({ ...card, means: SWAPPED[card.means] ?? card.means })),
});

const frame: Change = (plan, value) => {
  const [name, year] = value.split("/");
  const equinox = year === undefined ? null : Number(year);
  return name === "ICRS" || name === "FK5" || name === "galactic" ? { ...plan, frame: name, equinox } : plan;
};

const axes = (plan: ReadingPlan, value: string): ReadingPlan => ({
  ...plan,
  frame: "FK5",
  equinox: Number(value),
});

const accept: Change = (plan, _value, finding) => ({
  ...plan,
  accepted: added(plan.accepted, acceptedKey(finding)),
});

/** Of the column, or of every one whose zero point is open where the question names none. */
const zeroPoint =
  (magnitudeSystem: "vega" | "ab"): Change =>
  (plan, _value, { column }) =>
    column !== null
      ? withCard(plan, column, () => ({ magnitudeSystem }))
      : {
          ...plan,
          columns: plan.columns.map((card) =>
            card.magnitudeSystem === null ? { ...card, magnitudeSystem } : card,
          ),
        };

/** A dialect that the contract does not have changes nothing. */
const dialect =
  (key: "decimalMark" | "delimiter" | "encoding"): Change =>
  (plan, value, finding) => {
    const read = readingPlan.shape[key].safeParse(value);
    return read.success ? accept({ ...plan, [key]: read.data }, value, finding) : plan;
  };

/** By the words before the colon, or the whole answer. */
const CHANGES: Readonly<Record<string, Change>> = {
  hour: (plan) => ({ ...plan, raUnit: "hour" }),
  deg: (plan) => ({ ...plan, raUnit: "deg" }),
  blank: onCard((card, text) => ({
    blankMarks: added(card.blankMarks, text),
    keptNumbers: without(card.keptNumbers, text),
  })),
  number: onCard((card, text) => ({
    keptNumbers: added(card.keptNumbers, text),
    blankMarks: without(card.blankMarks, text),
  })),
  unit: onCard((_card, unit) => ({ unit })),
  vega: zeroPoint("vega"),
  ab: zeroPoint("ab"),
  "with-cos": onCard(() => ({ hasCosDec: true })),
  "without-cos": onCard(() => ({ hasCosDec: false })),
  means: onCard((_card, means) => ({ means })),
  swap,
  frame,
  axes: (plan, year, finding) => accept(axes(plan, year), year, finding),
  date: (plan, year, finding) => accept({ ...plan, epoch: Number(year) }, year, finding),
  both: (plan, year, finding) => accept(axes({ ...plan, epoch: Number(year) }, year), year, finding),
  decimal: dialect("decimalMark"),
  delimiter: dialect("delimiter"),
  encoding: dialect("encoding"),
  accept,
};

/** The plan with that answer to the question; unchanged where the answer is none of it. */
export const answered = (plan: ReadingPlan, finding: Finding, value: string): ReadingPlan => {
  if (finding.answers.length === 0) {
    if (finding.code === "epoch-missing") return { ...plan, epoch: Number(value) };
    if (finding.code === "unit-unknown") return withCard(plan, finding.column, () => ({ unit: value }));
  }
  const colon = value.indexOf(":");
  const kind = colon < 0 ? value : value.slice(0, colon);
  const change = Object.hasOwn(CHANGES, kind) ? CHANGES[kind] : undefined;
  return change ? change(plan, value.slice(colon + 1), finding) : plan;
};
