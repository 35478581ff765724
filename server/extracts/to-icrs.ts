import type { ReadingPlan } from "#shared/api/extracts.ts";
import { RADIANS_PER_DEGREE } from "#shared/science/angles.ts";
import { julianDateOfEpoch } from "#shared/science/epoch.ts";
import { galacticToIcrs } from "#shared/science/frames.ts";
import { dateToIcrs } from "#shared/science/precession.ts";

/** Writes the ICRS position of one in the file's frame: right ascension at 0 and declination at 1, degrees. */
type ToIcrs = (target: Float64Array, longitude: number, latitude: number) => void;

const J2000 = 2000;

/**
 * The way from the frame of a plan to the ICRS; null where there is none to go. Axes of J2000.0 are those of the ICRS within
 * 0.03″; others precess (Capitaine, Wallace & Chapront 2003, A&A 412, 567).
 */
export const wayToIcrs = ({ frame, equinox }: Pick<ReadingPlan, "frame" | "equinox">): ToIcrs | null => {
  if (frame === "galactic") return galacticToIcrs;
  if (frame !== "FK5" || equinox === null || equinox === J2000) return null;
  const julianDate = julianDateOfEpoch(equinox);
  return (target, ra, dec) => dateToIcrs(target, ra, dec, julianDate);
};

const STEP = 1e-4;
const stepped = new Float64Array(2);

/**
 * Position angle in the ICRS of the direction that is north in the file's frame, radians.
 *
 * @param position the place in the ICRS, as `way` writes it
 */
export const northIn = (way: ToIcrs, position: Float64Array, longitude: number, latitude: number): number => {
  const step = latitude > 0 ? -STEP : STEP;
  way(stepped, longitude, latitude + step);
  const [ra = Number.NaN, dec = Number.NaN] = position;
  let east = (stepped[0] ?? Number.NaN) - ra;
  if (east > 180) east -= 360;
  if (east < -180) east += 360;
  const north = (stepped[1] ?? Number.NaN) - dec;
  return Math.atan2(Math.sign(step) * east * Math.cos(dec * RADIANS_PER_DEGREE), Math.sign(step) * north);
};
