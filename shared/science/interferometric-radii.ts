/** Radii of K and M dwarfs from interferometry: Boyajian et al. 2012, ApJ 757, 112. For cross-checks. */

/** Temperatures of the relation, K. */
export const INTERFEROMETRIC_TEFF_K = { coolest: 3200, hottest: 5500 } as const;
/** Powers of Teff, 0 to 3. A later erratum replaced them (from memory; its numbers were not found). */
export const INTERFEROMETRIC_RADIUS_COEFFICIENTS = [-10.8828, 7.18727e-3, -1.50957e-6, 1.07572e-10] as const;
/** Masses of the calibration stars, M☉ (from memory). */
export const INTERFEROMETRIC_MASS = { least: 0.13, most: 0.9 } as const;
/** Powers of the mass, 0 to 2. */
export const MASS_RADIUS_COEFFICIENTS = [0.0906, 0.6063, 0.32] as const;

/**
 * Radius from temperature, R☉: `−10.8828 + 7.18727e−3 T − 1.50957e−6 T² + 1.07572e−10 T³`. Superseded by an erratum: prefer the
 * radius from M_Ks, or from light and temperature.
 *
 * @param teffK 3200 to 5500 K
 * @returns NaN outside
 * @see Boyajian et al. 2012, ApJ 757, 112
 * @example interferometricRadiusFromTeff(4000) // 0.59777
 */
export const interferometricRadiusFromTeff = (teffK: number): number => {
  if (!(teffK >= INTERFEROMETRIC_TEFF_K.coolest && teffK <= INTERFEROMETRIC_TEFF_K.hottest))
    return Number.NaN;
  const c = INTERFEROMETRIC_RADIUS_COEFFICIENTS;
  return c[0] + teffK * (c[1] + teffK * (c[2] + teffK * c[3]));
};

/**
 * Radius from mass, R☉: `0.0906 + 0.6063 M + 0.3200 M²`.
 *
 * @param massSolar M☉, 0.13 to 0.90
 * @returns NaN outside
 * @see Boyajian et al. 2012, ApJ 757, 112
 */
export const interferometricRadiusFromMass = (massSolar: number): number => {
  if (!(massSolar >= INTERFEROMETRIC_MASS.least && massSolar <= INTERFEROMETRIC_MASS.most)) return Number.NaN;
  const c = MASS_RADIUS_COEFFICIENTS;
  return c[0] + massSolar * (c[1] + massSolar * c[2]);
};
