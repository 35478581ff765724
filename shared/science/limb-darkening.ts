/**
 * Quadratic limb darkening, `I(μ)/I(1) = 1 − u1 (1 − μ) − u2 (1 − μ)²`, in a broad red band (600 to 1000 nm). Coefficients
 * of Claret 2018, A&A 618, A20, table 5, log g 4.5, solar metallicity; linear between temperatures. The trend is not
 * monotonic.
 */
const TABLE: readonly (readonly [teffK: number, u1: number, u2: number])[] = [
  [2300, 0.5076, 0.3676],
  [2500, 0.4131, 0.4608],
  [2700, 0.2626, 0.5381],
  [2900, 0.1863, 0.5198],
  [3000, 0.1719, 0.4977],
  [3200, 0.167, 0.4609],
  [3400, 0.1862, 0.4287],
  [3500, 0.2007, 0.4094],
  [3700, 0.2348, 0.375],
  [3800, 0.2604, 0.3569],
  [4000, 0.3416, 0.2948],
  [4300, 0.4844, 0.1877],
  [4500, 0.5047, 0.1564],
  [4800, 0.4652, 0.1789],
  [5100, 0.4258, 0.1936],
  [5300, 0.405, 0.2004],
  [5500, 0.3876, 0.2036],
  [5800, 0.3508, 0.2223],
  [6000, 0.3362, 0.2251],
  [6300, 0.3189, 0.2278],
  [6500, 0.3092, 0.2271],
  [6800, 0.2942, 0.2287],
  [7000, 0.2858, 0.229],
  [7200, 0.2765, 0.2297],
];

export interface LimbDarkening {
  readonly u1: number;
  readonly u2: number;
}

/** Coefficients for that temperature, K; null outside 2300 to 7200 K. */
export const limbDarkening = (teffK: number): LimbDarkening | null => {
  for (let i = 1; i < TABLE.length; i++) {
    const [t0, a0, b0] = TABLE[i - 1] ?? [0, 0, 0];
    const [t1, a1, b1] = TABLE[i] ?? [0, 0, 0];
    if (teffK >= t0 && teffK <= t1) {
      const x = (teffK - t0) / (t1 - t0);
      return { u1: a0 + x * (a1 - a0), u2: b0 + x * (b1 - b0) };
    }
  }
  return null;
};

/**
 * Brightness under a small planet at distance z from the centre (in stellar radii) over the mean of the disc:
 * `I(μ) / (1 − u1/3 − u2/6)`; at z = 0 the factor by which a central transit is deeper than k².
 *
 * @see Mandel & Agol 2002, ApJ 580, L171, section 5; error below 0.1 % for z < 0.5 and k ≤ 0.1
 */
export const relativeBrightness = ({ u1, u2 }: LimbDarkening, z: number): number => {
  const mu = Math.sqrt(Math.max(0, 1 - z * z));
  return (1 - u1 * (1 - mu) - u2 * (1 - mu) ** 2) / (1 - u1 / 3 - u2 / 6);
};
