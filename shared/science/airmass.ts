import { RADIANS_PER_DEGREE } from "./angles.ts";

/**
 * Relative optical airmass `1 / (sin h + 0.50572 (h + 6.07995)^−1.6364)`: 37.92 at the horizon, and 0.99971 at the zenith,
 * as fitted.
 *
 * @param altitudeDeg h, altitude as seen (refracted), degrees, 0 to 90; NaN outside
 * @see Kasten & Young 1989, Appl. Opt. 28, 4735
 */
export const airmassKastenYoung = (altitudeDeg: number): number =>
  altitudeDeg >= 0 && altitudeDeg <= 90
    ? 1 / (Math.sin(altitudeDeg * RADIANS_PER_DEGREE) + 0.50572 * (altitudeDeg + 6.07995) ** -1.6364)
    : Number.NaN;

/**
 * Relative optical airmass `1 / sin(h + 244 / (165 + 47 h^1.1))`: 38.75 at the horizon.
 *
 * @param altitudeDeg h, altitude as seen (refracted), degrees, 0 to 90; NaN outside
 * @see Pickering 2002, DIO 12, 1
 */
export const airmassPickering = (altitudeDeg: number): number =>
  altitudeDeg >= 0 && altitudeDeg <= 90
    ? 1 / Math.sin((altitudeDeg + 244 / (165 + 47 * altitudeDeg ** 1.1)) * RADIANS_PER_DEGREE)
    : Number.NaN;
