/** What is taken for the eccentricity of an orbit that nobody has measured. */
export type EccentricityPrior =
  | { readonly prior: "circular" }
  | { readonly prior: "fixed"; readonly e: number }
  /** Beta distribution of the eccentricity. */
  | { readonly prior: "beta"; readonly alpha: number; readonly beta: number };
