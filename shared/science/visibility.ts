import { icrsToEcliptic } from "./frames.ts";
import { sunLongitudeOffset } from "./keep-out.ts";
import { FIRST_SUN_JD, LAST_SUN_JD, sunLongitudeCounted } from "./sun.ts";

/** A span of time, as Julian dates. */
export interface Window {
  readonly start: number;
  readonly end: number;
}

/** Mean motion of the Sun among the stars, degrees a day. */
const SUN_RATE = 0.985609;
/** Each step takes 30 times off the error, which begins at 2 days: 10⁻⁹ days are left. */
const STEPS = 8;

/** The Julian date at which the counted longitude of the Sun has a value, near the date given. */
const whenSunAt = (longitude: number, near: number, longitudeThere: number): number => {
  let date = near + (longitude - longitudeThere) / SUN_RATE;
  for (let step = 0; step < STEPS; step++) {
    // Held to the range of the formula: a date beyond it is cut off by the caller anyway.
    const held = Math.min(LAST_SUN_JD, Math.max(FIRST_SUN_JD, date));
    date = held + (longitude - sunLongitudeCounted(held)) / SUN_RATE;
  }
  return date;
};

/** The arcs of the Sun's longitude, counted from the star's own, in which the elongation lies within the band. */
const arcs = (near: number, far: number): [number, number][] => {
  if (near === far) return [];
  if (near === 0 && far === 180) return [[0, 360]];
  if (near === 0) return [[-far, far]];
  if (far === 180) return [[near, 360 - near]];
  return [
    [near, far],
    [360 - far, 360 - near],
  ];
};

/**
 * When a star's elongation from the Sun lies within the field of regard of an instrument: the spans between two dates, in
 * order. The Sun's true, uneven motion is used; the edges are right to 0.02 days times 1/sin of the angle at which the Sun
 * crosses them. The motion of the star and of a satellite about the Earth are left out.
 *
 * @param ra degrees (ICRS); @param dec degrees
 * @param least elongation, degrees; @param most degrees; 0 ≤ least ≤ most ≤ 180
 * @param from Julian date; @param to Julian date; within 1950 to 2050
 * @returns spans within [from, to], none when the star is never in the field; null when an argument is out of range
 */
export const visibilityWindows = (
  ra: number,
  dec: number,
  least: number,
  most: number,
  from: number,
  to: number,
): Window[] | null => {
  const ecliptic = new Float64Array(2);
  icrsToEcliptic(ecliptic, ra, dec);
  const [longitude = Number.NaN, latitude = Number.NaN] = ecliptic;
  const near = sunLongitudeOffset(least, latitude);
  const far = sunLongitudeOffset(most, latitude);
  const first = sunLongitudeCounted(from);
  const last = sunLongitudeCounted(to);
  if (!(near <= far && from <= to && first <= last) || Number.isNaN(longitude)) return null;
  const bands = arcs(near, far);
  if (bands[0]?.[1] === 360 && bands[0][0] === 0) return [{ start: from, end: to }];
  const windows: Window[] = [];
  for (let turn = Math.floor((first - longitude) / 360) - 1; longitude + 360 * turn - 180 < last; turn++)
    for (const [opens, closes] of bands) {
      const start = longitude + 360 * turn + opens;
      const end = longitude + 360 * turn + closes;
      if (end <= first || start >= last) continue;
      windows.push({
        start: start <= first ? from : whenSunAt(start, from, first),
        end: end >= last ? to : whenSunAt(end, from, first),
      });
    }
  return windows;
};
