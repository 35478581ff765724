import { type Column, findColumn } from "#shared/catalogue/columns.ts";

/** What the sheet tells of a star, in order, in words that need no key. */
const TOLD: readonly (readonly [key: string, words: string])[] = [
  ["distance", "Distance"],
  ["teff", "Effective temperature"],
  ["radius", "Radius"],
  ["mass", "Mass"],
  ["luminosity", "Luminosity"],
  ["hz_inner", "Habitable zone from"],
  ["hz_outer", "Habitable zone to"],
  ["earth_distance", "Earth's insolation at"],
  ["earth_period", "Period there"],
  ["transit_probability", "Transit probability there"],
  ["transit_duration", "Transit duration there"],
  ["earth_depth", "Depth of 1 R⊕, no limb darkening"],
  ["noise_1h", "Noise in one hour"],
  ["transits", "Transits in the campaign"],
  ["r_min", "Smallest planet found there"],
];

/** Whether a column is worked out, so that its workings can be shown; a count of flags is not a formula. */
export const hasWorkings = (key: string): boolean => {
  const column = findColumn(key);
  return column !== undefined && column.stage !== "given" && key !== "flags";
};

export interface ToldColumn {
  readonly column: Column;
  readonly words: string;
}

/** The quantities of the sheet: those always told, then whatever else the table shows and is worked out. */
export const toldColumns = (shown: readonly string[]): ToldColumn[] => {
  const told = new Set(TOLD.map(([key]) => key));
  const more = shown.filter((key) => hasWorkings(key) && !told.has(key));
  const all = [...TOLD, ...more.map((key) => [key, findColumn(key)?.description ?? key] as const)];
  return all.flatMap(([key, words]) => {
    const column = findColumn(key);
    return column ? [{ column, words }] : [];
  });
};
