/** What bright stars do to the photometry of the survey and of the near infrared (Casagrande et al. 2021, MNRAS 507, 2684). */

/** Brightest magnitudes with which colours give a temperature: brighter stars saturate. */
export const BRIGHTEST_MAG = { g: 6, bp: 5, rp: 5, j: 5, h: 4.8, ks: 4.2 } as const;

/** Powers of G, 0 to 3, in the correction for saturation, and the G below which it is needed. */
export const G_SATURATION_COEFFICIENTS = [-0.09892, 0.059, -0.009775, 4.934e-4] as const;
export const FAINTEST_SATURATED_G = 8;

/**
 * G corrected for saturation, mag: for 6 ≤ G < 8 the polynomial `−0.09892 + 0.059 G − 0.009775 G² + 4.934e−4 G³` is added; G of 8
 * and fainter stays.
 *
 * @param g G as published
 * @returns NaN for stars brighter than 6, which no colour relation takes
 * @see Riello et al. 2021, A&A 649, A3, eq. C.1
 */
export const unsaturatedG = (g: number): number => {
  if (!(g >= BRIGHTEST_MAG.g)) return Number.NaN;
  const c = G_SATURATION_COEFFICIENTS;
  return g < FAINTEST_SATURATED_G ? g + c[0] + g * (c[1] + g * (c[2] + g * c[3])) : g;
};
