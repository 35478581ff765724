import { AU_PER_SOLAR_RADIUS, GAUSSIAN_YEAR_D } from "./constants.ts";

/** Period of a light planet, days: Kepler's third law, `365.2568984 √(a³ / M)`, a in au, M in M☉. */
export const periodFromAxis = (axisAu: number, massSolar: number): number =>
  GAUSSIAN_YEAR_D * Math.sqrt((axisAu * axisAu * axisAu) / massSolar);

/** Semi-major axis, au, of a light planet with that period in days: the inverse of {@link periodFromAxis}. */
export const axisFromPeriod = (periodDays: number, massSolar: number): number =>
  Math.cbrt(massSolar * (periodDays / GAUSSIAN_YEAR_D) ** 2);

/** Semi-major axis in units of the stellar radius. */
export const scaledAxis = (axisAu: number, radiusSolar: number): number =>
  (axisAu * AU_PER_SOLAR_RADIUS) / radiusSolar;
