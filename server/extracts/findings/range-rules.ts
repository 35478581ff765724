/** Version of the rules below, raised with every change of one. */
export const RANGE_RULES_VERSION = 1;

export interface RangeRule {
  readonly key: string;
  /** In the canonical unit, ends included. */
  readonly least: number;
  readonly most: number;
  readonly unit: string;
}

const rule = (key: string, least: number, most: number, unit: string): RangeRule => ({
  key,
  least,
  most,
  unit,
});

const bands = ["g", "bp", "rp", "v", "j", "h", "ks", "card"];

/**
 * What a value of each quantity can be at all (common practice, no source). Values outside are kept as they are: a rule asks
 * people to look, and never changes a number.
 */
export const RANGE_RULES: readonly RangeRule[] = [
  // The nearest star has 768.5 mas (from memory).
  rule("parallax", -1000, 1000, "mas"),
  // The fastest star moves 10.4″ a year (from memory).
  rule("pmra", -12_000, 12_000, "mas/yr"),
  rule("pmdec", -12_000, 12_000, "mas/yr"),
  ...bands.map((band) => rule(`${band}_mag`, -2, 30, "mag")),
  rule("teff", 1500, 60_000, "K"),
  rule("logg", -1, 9.5, "dex"),
  rule("feh", -6, 1.5, "dex"),
  rule("distance", 1, 100_000, "pc"),
  rule("ebv", -0.5, 20, "mag"),
  rule("ruwe", 0, 200, ""),
  rule("light_share", 0, 1, ""),
  rule("epoch", 1800, 2200, "yr"),
];
