import { isLatitude, latitudeOf, longitudeOf, MAS_PER_DEGREE, RADIANS_PER_DEGREE } from "./angles.ts";
import { AU_M } from "./constants.ts";

/** Where {@link moveStar} writes each element. */
export const MOVED = {
  /** Right ascension, degrees. */
  ra: 0,
  /** Declination, degrees. */
  dec: 1,
  /** Parallax, mas. */
  parallax: 2,
  /** Proper motion in right ascension with the factor cos δ, mas/yr. */
  motionRa: 3,
  /** Proper motion in declination, mas/yr. */
  motionDec: 4,
  /** Radial velocity, km/s. */
  radialVelocity: 5,
} as const;

/** Elements that {@link moveStar} writes. */
export const MOVED_LENGTH = 6;

/** One au in a Julian year, km/s: 4.740470463533. */
export const AU_PER_YEAR_KM_S = AU_M / 1000 / (365.25 * 86_400);

const RADIANS_PER_MAS = RADIANS_PER_DEGREE / MAS_PER_DEGREE;

/**
 * Moves a star in a straight line at constant speed through space and writes its six elements at the other epoch.
 *
 * Rigorous, at the poles too: ESA 1997, The Hipparcos and Tycho Catalogues, SP-1200, vol. 1, 1.5.5; Butkevich & Lindegren
 * 2014, A&A 570, A62. Light-time is left out, as there; with it Barnard's star moves 0.03 mas more in 16 years and 0.84 mas
 * more in 84.
 *
 * The radial velocity shows as the perspective acceleration: 164 mas in 16 years for Barnard's star, unmeasurable for most
 * others. Without it, or without a positive parallax to turn it into a rate, the star is taken to move across the line of
 * sight alone.
 *
 * @param target receives the elements, see {@link MOVED}; at least {@link MOVED_LENGTH} long. Place and motion are NaN when
 *   the place or the proper motion is missing: a motion that is not known is not a star at rest. The parallax is NaN without
 *   one; the radial velocity without one, or without a positive parallax
 * @param ra degrees, ICRS; @param dec degrees, −90 to 90
 * @param parallaxMas mas, or NaN
 * @param motionRa μα* = μα cos δ, mas/yr; @param motionDec mas/yr
 * @param radialVelocity km/s, positive when receding, or NaN
 * @param years Julian years from the position's own epoch to the one wanted; negative into the past
 */
export const moveStar = (
  target: Float64Array,
  ra: number,
  dec: number,
  parallaxMas: number,
  motionRa: number,
  motionDec: number,
  radialVelocity: number,
  years: number,
): void => {
  const latitude = isLatitude(dec) ? dec * RADIANS_PER_DEGREE : Number.NaN;
  const cosRa = Math.cos(ra * RADIANS_PER_DEGREE);
  const sinRa = Math.sin(ra * RADIANS_PER_DEGREE);
  const cosDec = Math.cos(latitude);
  const sinDec = Math.sin(latitude);
  const a = motionRa * RADIANS_PER_MAS;
  const d = motionDec * RADIANS_PER_MAS;
  const isPerspective = parallaxMas > 0 && !Number.isNaN(radialVelocity);
  const radial = isPerspective ? (radialVelocity * parallaxMas * RADIANS_PER_MAS) / AU_PER_YEAR_KM_S : 0;

  const rx = cosDec * cosRa;
  const ry = cosDec * sinRa;
  const mx = -sinRa * a - sinDec * cosRa * d;
  const my = cosRa * a - sinDec * sinRa * d;
  const mz = cosDec * d;
  const transverse2 = a * a + d * d;
  const along = 1 + radial * years;
  const f = 1 / Math.sqrt(along * along + transverse2 * years * years);

  const x = rx * along + mx * years;
  const y = ry * along + my * years;
  const z = sinDec * along + mz * years;
  const newRa = longitudeOf(x, y);
  const newDec = latitudeOf(x, y, z);
  const drag = transverse2 * years;
  const f3 = f * f * f;
  const nx = (mx * along - rx * drag) * f3;
  const ny = (my * along - ry * drag) * f3;
  const nz = (mz * along - sinDec * drag) * f3;

  const newCosRa = Math.cos(newRa * RADIANS_PER_DEGREE);
  const newSinRa = Math.sin(newRa * RADIANS_PER_DEGREE);
  const newSinDec = Math.sin(newDec * RADIANS_PER_DEGREE);
  const newCosDec = Math.cos(newDec * RADIANS_PER_DEGREE);
  const newRadial = (radial + (transverse2 + radial * radial) * years) * f * f;
  const newParallax = parallaxMas * f;
  target[MOVED.ra] = newRa;
  target[MOVED.dec] = newDec;
  target[MOVED.parallax] = newParallax;
  target[MOVED.motionRa] = (ny * newCosRa - nx * newSinRa) / RADIANS_PER_MAS;
  target[MOVED.motionDec] = (nz * newCosDec - (nx * newCosRa + ny * newSinRa) * newSinDec) / RADIANS_PER_MAS;
  target[MOVED.radialVelocity] = isPerspective
    ? (newRadial * AU_PER_YEAR_KM_S) / (newParallax * RADIANS_PER_MAS)
    : Number.NaN;
};

/**
 * Error of a position along one axis after a time, in the unit of the errors (mas and mas/yr):
 * `√(σ² + 2 t ρ σ σ_μ + t² σ_μ²)`.
 *
 * For a star without a proper motion, σ_μ is the spread of the motions of its kind (common practice, no source: 5 to
 * 50 mas/yr for field stars, several hundred for nearby M dwarfs).
 *
 * @param error σ at the position's own epoch
 * @param motionError σ_μ per Julian year
 * @param correlation ρ between position and motion, −1 to 1; NaN is returned outside
 * @param years Julian years, either way
 */
export const positionErrorAfter = (
  error: number,
  motionError: number,
  correlation: number,
  years: number,
): number => {
  if (!(error >= 0 && motionError >= 0 && Math.abs(correlation) <= 1)) return Number.NaN;
  const moved = years * motionError;
  return Math.sqrt(Math.max(0, error * error + 2 * correlation * error * moved + moved * moved));
};
