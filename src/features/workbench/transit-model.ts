import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import { transitLossPpm } from "#shared/science/light-curve.ts";
import { limbDarkening } from "#shared/science/limb-darkening.ts";
import { scaledAxis } from "#shared/science/orbit.ts";
import { centralDuration } from "#shared/science/transit.ts";

/** Light against time around mid-transit of a planet of one Earth radius where the insolation is Earth's. */
export interface DrawnTransit {
  /** Hours from mid-transit and loss of light in ppm. */
  readonly curve: readonly (readonly [hours: number, ppm: number])[];
  /** The same with noise drawn onto it, one point per bin; empty where the noise is not known. */
  readonly dots: readonly (readonly [hours: number, ppm: number])[];
  readonly durationHours: number;
  /** Deepest loss, ppm, with limb darkening and the light share. */
  readonly depthPpm: number;
  /** Noise of one dot, ppm. */
  readonly dotPpm: number | null;
  /** Transits folded onto each other. */
  readonly folded: number;
}

const CURVE_POINTS = 240;
const DOTS = 96;
/** Half of the time shown, in durations. */
const HALF_SPAN = 1.6;

/** Numbers in 0…1 that are the same for the same seed (mulberry32). */
const seeded = (seed: number) => {
  let state = seed | 0;
  return (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
};

/** Normal deviates by Box and Muller. */
const normal = (random: () => number): number =>
  Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

const seedOf = (id: string): number =>
  [...id].reduce((seed, c) => (Math.imul(seed, 31) + c.charCodeAt(0)) | 0, 7);

/** Impact parameter at which a transit lasts that share of a central one: what the recipe's rule amounts to. */
const impactOf = (share: number): number => Math.sqrt(Math.max(0, 1 - Math.min(1, share) ** 2));

/**
 * @param values of the star sheet, by column key
 * @returns null where an input is blank or outside the limb-darkening table
 */
export const drawTransit = (
  id: string,
  values: Readonly<Record<string, number | undefined>>,
): DrawnTransit | null => {
  const { radius, teff, earth_distance, earth_period, transit_duration, noise_1h, transits } = values;
  if (!radius || !teff || !earth_distance || !earth_period || !transit_duration) return null;
  const darkening = limbDarkening(teff);
  if (!darkening) return null;
  const share = values.light_share ?? 1;
  const periodHours = 24 * earth_period;
  const a = scaledAxis(earth_distance, radius);
  const k = 1 / (EARTH_RADII_PER_SOLAR * radius);
  const b = impactOf(transit_duration / centralDuration(periodHours, a));
  const lossAt = (hours: number): number => share * transitLossPpm(hours, periodHours, a, k, b, darkening);
  const half = HALF_SPAN * transit_duration;
  const spread = (n: number): number[] => Array.from({ length: n }, (_, i) => half * ((2 * i + 1) / n - 1));
  const folded = Math.max(1, transits ?? 1);
  const binHours = (2 * half) / DOTS;
  const dotPpm = noise_1h === undefined ? null : noise_1h / Math.sqrt(binHours * folded);
  const random = seeded(seedOf(id));
  return {
    curve: spread(CURVE_POINTS).map((hours) => [hours, lossAt(hours)] as const),
    dots:
      dotPpm === null
        ? []
        : spread(DOTS).map((hours) => [hours, lossAt(hours) + dotPpm * normal(random)] as const),
    durationHours: transit_duration,
    depthPpm: lossAt(0),
    dotPpm,
    folded,
  };
};
