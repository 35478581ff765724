import type { StarSheet } from "#shared/api/stars.ts";
import type { Working, WorkingInput } from "#shared/api/workings.ts";

/** A step and all that it rests on, each once, in the order in which they are met. */
export const stepsUnder = (steps: readonly Working[], key: string): Working[] => {
  const byKey = new Map(steps.map((step) => [step.key, step]));
  const found = new Map<string, Working>();
  const visit = (next: string): void => {
    const step = byKey.get(next);
    if (!step || found.has(next)) return;
    found.set(next, step);
    for (const input of step.inputs) if (input.step !== null) visit(input.step);
  };
  visit(key);
  return [...found.values()];
};

/** Quantities that no formula names go by their key: that is no symbol. */
export const hasSymbol = ({ key, symbol }: Working): boolean => symbol !== key;

/** Columns under which an extract gives what a formula writes with that symbol. */
const GIVEN_COLUMNS: Readonly<Record<string, string>> = {
  plx: "parallax",
  sigma_plx: "parallax_err",
  d_given: "distance",
  Ks: "ks_mag",
  G: "g_mag",
  BP: "bp_mag",
  RP: "rp_mag",
  V: "v_mag",
  J: "j_mag",
  H: "h_mag",
  T_given: "teff",
  logg: "logg",
  FeH: "feh",
  E_BV: "ebv",
  share: "light_share",
};

/** The magnitude that an instrument card asks for carries its column in its name. */
const columnOf = ({ symbol, name }: WorkingInput): string | undefined =>
  GIVEN_COLUMNS[symbol] ?? /\((\w+)\)$/.exec(name)?.[1];

/** The extracts' rows that give just this value; empty where the reader may not see them. */
export const givenBy = (input: WorkingInput, entries: StarSheet["entries"]): StarSheet["entries"] => {
  const column = columnOf(input);
  if (column === undefined || input.value === null) return [];
  return entries.filter(({ values }) => values[column] === input.value);
};
