/**
 * Extinction by dust from the reddening E(B − V), in the bands of the survey and of the near infrared: the law of
 * Fitzpatrick, scaled as by Schlafly & Finkbeiner, with the coefficients of Casagrande et al. 2021, MNRAS 507, 2684.
 */

export type ExtinctionBand = "g" | "bp" | "rp" | "j" | "h" | "ks";

/** Powers 0 to 3 of the intrinsic BP − RP in R = A / E(B − V). */
export const EXTINCTION_COEFFICIENTS: Readonly<
  Record<ExtinctionBand, readonly [number, number, number, number]>
> = {
  g: [2.609, -0.475, 0.053, 0],
  bp: [2.998, -0.14, -0.175, 0.062],
  rp: [1.689, -0.059, 0, 0],
  j: [0.719, 0, 0, 0],
  h: [0.455, 0, 0, 0],
  ks: [0.306, 0, 0, 0],
};

/** Share of E(B − V) by which BP − RP reddens, for the colour that the coefficients are read at. */
export const BP_RP_REDDENING = 0.8;

/**
 * Intrinsic BP − RP for which the broad bands have coefficients: the colours of the stars that they serve (a judgement of
 * this project; the paper's program does not limit them).
 */
export const EXTINCTION_BP_RP = { bluest: 0.2, reddest: 2.55 } as const;

/**
 * Extinction in a band, mag: `R(c₀) E(B − V)` with `c₀ = (BP − RP) − 0.8 E(B − V)`. To be subtracted from the magnitude.
 *
 * @param band
 * @param ebv E(B − V), mag, 0 or more
 * @param bpRp BP − RP as observed; only G, BP and RP depend on it
 * @returns NaN for a negative reddening, and in G, BP and RP for an intrinsic colour outside 0.20 to 2.55
 * @see Casagrande et al. 2021, MNRAS 507, 2684
 * @example extinction("ks", 0.1, 0.82) // 0.0306
 */
export const extinction = (band: ExtinctionBand, ebv: number, bpRp: number): number => {
  const c = EXTINCTION_COEFFICIENTS[band];
  if (!(ebv >= 0)) return Number.NaN;
  if (c[1] === 0) return c[0] * ebv;
  const colour = bpRp - BP_RP_REDDENING * ebv;
  if (!(colour >= EXTINCTION_BP_RP.bluest && colour <= EXTINCTION_BP_RP.reddest)) return Number.NaN;
  return (c[0] + colour * (c[1] + colour * (c[2] + colour * c[3]))) * ebv;
};

/** dA / dE(B − V) of {@link extinction}: `R(c₀) − 0.8 E(B − V) dR / dc₀`; NaN where the extinction is. */
export const extinctionSlope = (band: ExtinctionBand, ebv: number, bpRp: number): number => {
  const c = EXTINCTION_COEFFICIENTS[band];
  if (Number.isNaN(extinction(band, ebv, bpRp))) return Number.NaN;
  if (c[1] === 0) return c[0];
  const colour = bpRp - BP_RP_REDDENING * ebv;
  const coefficient = c[0] + colour * (c[1] + colour * (c[2] + colour * c[3]));
  return coefficient - BP_RP_REDDENING * ebv * (c[1] + colour * (2 * c[2] + 3 * c[3] * colour));
};
