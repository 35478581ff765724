/** How a value came about, by stored code; 0 stands beside a blank. Codes never change their meaning. */
export const METHODS = [
  { code: 1, key: "given", word: "as given by the preferred extract" },
  { code: 2, key: "sunlike-colour", word: "from BP − RP (Casagrande et al. 2021)" },
  { code: 3, key: "cool-colour", word: "from BP − RP (Mann et al. 2015), 52 K scatter" },
  { code: 4, key: "abs-ks", word: "M Ks relation" },
  { code: 5, key: "abs-ks-feh", word: "M Ks relation with [Fe/H]" },
  { code: 6, key: "light-and-temperature", word: "from luminosity and temperature (Stefan–Boltzmann)" },
  { code: 7, key: "spectrum", word: "from Teff, log g and [Fe/H] (Torres et al. 2010), 6.4 % scatter" },
  { code: 8, key: "correction-ks", word: "M Ks and its bolometric correction" },
  { code: 9, key: "correction-g", word: "M G and its bolometric correction (Andrae et al. 2018)" },
  { code: 10, key: "radius-and-temperature", word: "R² T⁴ (Stefan–Boltzmann)" },
  { code: 11, key: "inversion", word: "inverse of the parallax" },
  { code: 12, key: "volume-prior", word: "parallax with a prior of exponentially decreasing density" },
  { code: 13, key: "given-distance", word: "as given by the preferred extract" },
  { code: 14, key: "spectrum-size", word: "from Teff, log g and [Fe/H] (Torres et al. 2010), 3.2 % scatter" },
  { code: 20, key: "sunlike-bp-j", word: "from BP − J (Casagrande et al. 2021)" },
  { code: 21, key: "sunlike-bp-h", word: "from BP − H (Casagrande et al. 2021)" },
  { code: 22, key: "sunlike-bp-ks", word: "from BP − Ks (Casagrande et al. 2021)" },
  { code: 23, key: "sunlike-rp-j", word: "from RP − J (Casagrande et al. 2021)" },
  { code: 24, key: "sunlike-rp-h", word: "from RP − H (Casagrande et al. 2021)" },
  { code: 25, key: "sunlike-rp-ks", word: "from RP − Ks (Casagrande et al. 2021)" },
  { code: 26, key: "sunlike-g-j", word: "from G − J (Casagrande et al. 2021)" },
  { code: 27, key: "sunlike-g-h", word: "from G − H (Casagrande et al. 2021)" },
  { code: 28, key: "sunlike-g-ks", word: "from G − Ks (Casagrande et al. 2021)" },
  { code: 29, key: "sunlike-g-bp", word: "from G − BP (Casagrande et al. 2021)" },
  { code: 30, key: "sunlike-g-rp", word: "from G − RP (Casagrande et al. 2021)" },
  { code: 31, key: "cool-v-j", word: "from V − J (Mann et al. 2015), 55 K scatter" },
] as const;

export type MethodKey = (typeof METHODS)[number]["key"];

const codes = new Map<string, number>(METHODS.map((method) => [method.key, method.code]));
const words = new Map<number, string>(METHODS.map((method) => [method.code, method.word]));

export const methodCode = (key: MethodKey): number => codes.get(key) ?? 0;

/** The key of a stored code; undefined for a blank. */
export const methodKey = (code: number): MethodKey | undefined =>
  METHODS.find((method) => method.code === code)?.key;

/** The words of a stored code; empty for a blank. */
export const methodWord = (code: number): string => words.get(code) ?? "";
