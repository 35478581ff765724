import type { CampaignSettings, FormulaCard } from "#shared/science/cards.ts";
import { massFromAbsKs, radiusFromAbsKs } from "#shared/science/cool-dwarfs.ts";
import { smallestPlanet, transitsInCampaign } from "#shared/science/detection.ts";
import { absoluteMagnitude } from "#shared/science/distance.ts";
import { distanceAtInsolation, insolationAtLimit } from "#shared/science/habitable-zone.ts";
import { luminosityFromRadius } from "#shared/science/luminosity.ts";
import { noiseInOneHour } from "#shared/science/noise.ts";
import { periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import { centralDuration, transitProbability } from "#shared/science/transit.ts";

/** What the practice formulas read and write, a column each; shared between threads. */
const INPUTS = ["parallax", "ks", "teff", "magnitude"] as const;
const OUTPUTS = [
  "absKs",
  "radius",
  "mass",
  "luminosity",
  "inner",
  "outer",
  "innerPeriod",
  "outerPeriod",
  "earth",
  "earthPeriod",
  "probability",
  "duration",
  "noise",
  "transits",
  "rMin",
] as const;

export type PracticeColumns = Readonly<
  Record<(typeof INPUTS)[number] | (typeof OUTPUTS)[number], Float64Array>
>;

export const CARD: FormulaCard = {
  model: "formula",
  passband: "card_mag",
  referenceMagnitude: 10,
  photonPpm: 90,
  backgroundPpm: 12,
  floorPpm: 25,
  brightLimit: 7,
  faintLimit: 14.5,
};
export const CAMPAIGN: CampaignSettings = {
  lengthDays: 180,
  duty: 0.9,
  leastTransits: 1,
  snrLimit: 7.1,
  statistic: "boxcar",
};

const column = (length: number): Float64Array =>
  new Float64Array(new SharedArrayBuffer(length * Float64Array.BYTES_PER_ELEMENT));

/** Cool dwarfs inside every relation, spread evenly and out of order. */
export const practiceColumns = (length: number): PracticeColumns => {
  const columns = Object.fromEntries([...INPUTS, ...OUTPUTS].map((key) => [key, column(length)])) as Record<
    keyof PracticeColumns,
    Float64Array
  >;
  for (let i = 0; i < length; i++) {
    const share = ((i * 7919) % length) / length;
    columns.parallax[i] = 20 + 60 * share;
    columns.ks[i] = 8 + 5 * Math.log10(100 / (20 + 60 * share)) + 3 * ((i % 1000) / 1000 - 0.5);
    columns.teff[i] = 2700 + 1200 * share;
    columns.magnitude[i] = 8 + 6 * share;
  }
  return columns;
};

/** The practice formulas for a range of stars: no errors, no reasons, the science's own functions in one loop. */
export const runPracticeFormulas = (c: PracticeColumns, from: number, to: number): void => {
  for (let i = from; i < to; i++) {
    const teff = c.teff[i] as number;
    const absKs = absoluteMagnitude(c.ks[i] as number, 1000 / (c.parallax[i] as number), 0);
    const radius = radiusFromAbsKs(absKs);
    const mass = massFromAbsKs(absKs);
    const luminosity = luminosityFromRadius(radius, teff);
    const inner = distanceAtInsolation(luminosity, insolationAtLimit("runaway-greenhouse", teff));
    const outer = distanceAtInsolation(luminosity, insolationAtLimit("maximum-greenhouse", teff));
    const earth = distanceAtInsolation(luminosity, 1);
    const earthPeriod = periodFromAxis(earth, mass);
    const a = scaledAxis(earth, radius);
    const duration = centralDuration(24 * earthPeriod, a);
    const noise = noiseInOneHour(CARD, c.magnitude[i] as number);
    const transits = transitsInCampaign(CAMPAIGN, earthPeriod);
    c.absKs[i] = absKs;
    c.radius[i] = radius;
    c.mass[i] = mass;
    c.luminosity[i] = luminosity;
    c.inner[i] = inner;
    c.outer[i] = outer;
    c.innerPeriod[i] = periodFromAxis(inner, mass);
    c.outerPeriod[i] = periodFromAxis(outer, mass);
    c.earth[i] = earth;
    c.earthPeriod[i] = earthPeriod;
    c.probability[i] = transitProbability(a);
    c.duration[i] = duration;
    c.noise[i] = noise;
    c.transits[i] = transits;
    c.rMin[i] = smallestPlanet(radius, CAMPAIGN.snrLimit, noise, transits, duration, 1);
  }
};
