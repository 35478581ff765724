import type { Working, WorkingInput, Workings } from "../api/workings.ts";

const ORIGINS: Readonly<Record<WorkingInput["origin"], string>> = {
  given: "as given",
  assumed: "assumed by the recipe",
  recipe: "set by the recipe",
  instrument: "set by the card or campaign",
  derived: "worked out below",
};

/** Every digit: whoever redoes the sum must come to the same number. */
const digits = (value: number | null): string => (value === null ? "none" : String(value));

const withUnit = (value: number | null, unit: string): string =>
  unit === "" || value === null ? digits(value) : `${digits(value)} ${unit}`;

const inputLine = ({ symbol, name, unit, value, error, origin }: WorkingInput): string => {
  const size = error === null ? "" : ` ± ${digits(error)}`;
  return `  ${symbol} = ${digits(value)}${size}${unit === "" ? "" : ` ${unit}`}   ${name}, ${ORIGINS[origin]}`;
};

const resultLine = ({ symbol, value, error, unit, blank }: Working): string => {
  if (value === null) return `${symbol} is blank: ${blank ? blank.sentence : "an input is missing."}`;
  return `${symbol} = ${withUnit(value, unit)}${error === null ? "" : ` ± ${withUnit(error, unit)}`}`;
};

const formulaLines = ({ symbol, formula, substituted, isRoot, value }: Working): string[] => {
  if (formula === "") return [];
  if (isRoot) return [`0 = ${formula}`, ...(value === null ? [] : [`0 = ${substituted}`])];
  return [`${symbol} = ${formula}`, ...(value === null ? [] : [`  = ${substituted}`])];
};

const rangeLine = ({ symbol, from, to, value, holds }: Working["ranges"][number]): string =>
  `  holds for ${symbol} from ${from} to ${to}: ${value === null ? `no ${symbol}` : value}, ${holds ? "inside" : "outside"}`;

const errorLines = (working: Working): string[] =>
  working.errorParts.length === 0
    ? []
    : [
        "  error, in quadrature:",
        ...working.errorParts.map(
          ({ source, size }) => `    ${source}: ${size === null ? "no error given" : digits(size)}`,
        ),
      ];

const lines = (working: Working): string[] => [
  `${working.label}${working.method === "" ? "" : `, ${working.method}`}`,
  resultLine(working),
  ...formulaLines(working),
  ...working.inputs.map(inputLine),
  ...working.constants.map(
    ({ symbol, value, unit, source }) => `  ${symbol} = ${withUnit(value, unit)}   ${source}`,
  ),
  ...working.ranges.map(rangeLine),
  ...(working.scatter === "" ? [] : [`  scatter of the relation: ${working.scatter}`]),
  ...errorLines(working),
  ...(working.reference === "" ? [] : [`  ${working.reference}`]),
];

const drawnLines = (drawn: Workings["drawn"], working: Working | undefined): string[] => {
  if (!drawn || !working) return [];
  const interval = drawn.intervals[working.key];
  const told = interval
    ? `16 % ${digits(interval.p16)}, 50 % ${digits(interval.p50)}, 84 % ${digits(interval.p84)}`
    : "no interval: an input has no error, or too many draws leave the range of a relation";
  return ["", `${drawn.draws} draws, seed ${drawn.seed}: ${told}`];
};

/** The workings as plain text, from which a person can redo every step by hand. */
export const workingsText = ({ star, recipe, card, campaign, steps, drawn }: Workings): string =>
  [
    `${star}: ${steps[0]?.label ?? "nothing"}`,
    [
      `recipe ${recipe}`,
      ...(card === null ? [] : [`card ${card}`]),
      ...(campaign === null ? [] : [`campaign ${campaign}`]),
    ].join(", "),
    ...steps.flatMap((working) => ["", ...lines(working)]),
    ...drawnLines(drawn, steps[0]),
    "",
  ].join("\n");
