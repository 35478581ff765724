/**
 * Quadratic limb darkening, `I(μ)/I(1) = 1 − u1 (1 − μ) − u2 (1 − μ)²`, in a broad red band (600 to 1000 nm). Coefficients
 * of Claret 2018, A&A 618, A20, table 5 (spherical models, solar metallicity); linear between temperatures and between log g
 * 4.5 and 5.0, which costs 1 to 2 % of the depth. The trend is not monotonic: the boost of a depth is least near 3300 K and
 * greatest near 4400 K.
 */

type Row = readonly [teffK: number, u1: number, u2: number, u1Dense: number, u2Dense: number];

/** Temperature, both coefficients at log g 4.5, both at 5.0; no model at 5000 K, and none at 3000 K and 5.0. */
const MODELS: readonly Row[] = [
  [2300, 0.5076, 0.3676, 0.5221, 0.3406],
  [2500, 0.4131, 0.4608, 0.4703, 0.4207],
  [2700, 0.2626, 0.5381, 0.2975, 0.5494],
  [2900, 0.1863, 0.5198, 0.1998, 0.5387],
  [3000, 0.1719, 0.4977, Number.NaN, Number.NaN],
  [3200, 0.167, 0.4609, 0.1553, 0.4742],
  [3400, 0.1862, 0.4287, 0.159, 0.44],
  [3500, 0.2007, 0.4094, 0.1642, 0.4259],
  [3700, 0.2348, 0.375, 0.1769, 0.4062],
  [3800, 0.2604, 0.3569, 0.1859, 0.3961],
  [4000, 0.3416, 0.2948, 0.2283, 0.3639],
  [4300, 0.4844, 0.1877, 0.3722, 0.2671],
  [4500, 0.5047, 0.1564, 0.46, 0.1971],
  [4800, 0.4652, 0.1789, 0.4708, 0.1725],
  [5100, 0.4258, 0.1936, 0.4291, 0.1908],
  [5300, 0.405, 0.2004, 0.4065, 0.1996],
  [5500, 0.3876, 0.2036, 0.3884, 0.2021],
  [5800, 0.3508, 0.2223, 0.3449, 0.2258],
  [6000, 0.3362, 0.2251, 0.3289, 0.2288],
  [6300, 0.3189, 0.2278, 0.3097, 0.2299],
  [6500, 0.3092, 0.2271, 0.2989, 0.231],
  [6800, 0.2942, 0.2287, 0.2862, 0.2301],
  [7000, 0.2858, 0.229, 0.2787, 0.2293],
  [7200, 0.2765, 0.2297, 0.2707, 0.2288],
];

const COOLEST_K = 2300;
const HOTTEST_K = 7200;
const LEAST_LOGG = 4.5;
const MOST_LOGG = 5;

/** Linear between two rows at that temperature, all columns. */
const between = (before: Row, after: Row, teffK: number): Row => {
  const x = (teffK - before[0]) / (after[0] - before[0]);
  const mix = (column: 1 | 2 | 3 | 4): number => before[column] + x * (after[column] - before[column]);
  return [teffK, mix(1), mix(2), mix(3), mix(4)];
};

/** A row whose coefficients at log g 5.0 lack takes them from between its neighbours. */
const completed = (row: Row, i: number): Row => {
  const [before, after] = [MODELS[i - 1], MODELS[i + 1]];
  if (!Number.isNaN(row[3]) || !before || !after) return row;
  const [, , , u1Dense, u2Dense] = between(before, after, row[0]);
  return [row[0], row[1], row[2], u1Dense, u2Dense];
};

const TABLE: readonly Row[] = MODELS.map(completed);

/** Coefficient in column `of` (1 or 2) at log g 4.5, `of + 2` at 5.0. */
const coefficient = (of: 1 | 2, teffK: number, logg: number): number => {
  if (!(teffK >= COOLEST_K && teffK <= HOTTEST_K && logg >= LEAST_LOGG && logg <= MOST_LOGG))
    return Number.NaN;
  for (let i = 1; i < TABLE.length; i++) {
    const before = TABLE[i - 1];
    const after = TABLE[i];
    if (!before || !after || teffK > after[0]) continue;
    const x = (teffK - before[0]) / (after[0] - before[0]);
    const light = before[of] + x * (after[of] - before[of]);
    const dense = of === 1 ? 3 : 4;
    const y = (logg - LEAST_LOGG) / (MOST_LOGG - LEAST_LOGG);
    return light + y * (before[dense] + x * (after[dense] - before[dense]) - light);
  }
  return Number.NaN;
};

/** u1 at that temperature, K, and log g (cgs); NaN outside 2300 to 7200 K and 4.5 to 5.0. */
export const linearDarkening = (teffK: number, logg: number): number => coefficient(1, teffK, logg);

/** u2 at that temperature, K, and log g (cgs); NaN outside 2300 to 7200 K and 4.5 to 5.0. */
export const quadraticDarkening = (teffK: number, logg: number): number => coefficient(2, teffK, logg);

export interface LimbDarkening {
  readonly u1: number;
  readonly u2: number;
}

/** Both coefficients at that temperature, K, and log g (cgs); null outside 2300 to 7200 K and 4.5 to 5.0. */
export const limbDarkening = (teffK: number, logg = LEAST_LOGG): LimbDarkening | null => {
  const u1 = linearDarkening(teffK, logg);
  return Number.isNaN(u1) ? null : { u1, u2: quadraticDarkening(teffK, logg) };
};

/** One pair for all F, G and K dwarfs, and one for M dwarfs, where a temperature is not known; in a red band. */
export const SUNLIKE_DARKENING: LimbDarkening = { u1: 0.35, u2: 0.22 };
export const COOL_DWARF_DARKENING: LimbDarkening = { u1: 0.2, u2: 0.42 };

/** Mean brightness of the disc over that of its centre: `1 − u1/3 − u2/6`. */
export const meanBrightness = (u1: number, u2: number): number => 1 - u1 / 3 - u2 / 6;

/**
 * Brightness under a small planet at distance z from the centre (in stellar radii) over the mean of the disc:
 * `I(μ) / (1 − u1/3 − u2/6)`; at z = 0 the factor by which a central transit is deeper than k².
 *
 * @see Mandel & Agol 2002, ApJ 580, L171, section 5; error below 0.1 % for z < 0.5 and k ≤ 0.1
 */
export const relativeBrightness = ({ u1, u2 }: LimbDarkening, z: number): number => {
  const mu = Math.sqrt(Math.max(0, 1 - z * z));
  return (1 - u1 * (1 - mu) - u2 * (1 - mu) ** 2) / meanBrightness(u1, u2);
};

/**
 * Mean brightness along the chord at impact parameter b over the mean of the disc: the factor by which the depth that a box
 * sees exceeds k². With L = √(1 − b²), μ has the mean π L / 4 along the chord and μ² that of 2 L² / 3. At b = 0 it is also
 * the mean of {@link relativeBrightness} over impact parameters.
 *
 * @returns NaN where |b| > 1
 * @example chordBrightness(0.3508, 0.2223, 0) // 1.0678
 */
export const chordBrightness = (u1: number, u2: number, b: number): number => {
  const mu = (Math.PI / 4) * Math.sqrt(1 - b * b);
  const muSquared = (2 / 3) * (1 - b * b);
  return (1 - u1 * (1 - mu) - u2 * (1 - 2 * mu + muSquared)) / meanBrightness(u1, u2);
};
