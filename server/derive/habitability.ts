import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import {
  distanceAtInsolation,
  type HabitableLimit,
  insolationAtLimit,
  insolationSlope,
} from "#shared/science/habitable-zone.ts";
import { periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import type { Recipe } from "#shared/science/recipes.ts";
import { centralDuration, depthPpm, MEAN_CHORD, transitProbability } from "#shared/science/transit.ts";
import { combine, relativeError, SOURCE } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Writer } from "./writer.ts";

const HOURS_PER_DAY = 24;

/** Period at an axis whose error vector stands in `star.axisErrors`. */
const writePeriod = (star: Scratch, key: string, axis: number, writer: Writer): number => {
  if (Number.isNaN(star.mass)) {
    writer.blank(key, "needs-mass");
    return Number.NaN;
  }
  const period = periodFromAxis(axis, star.mass);
  combine(star.periodErrors, 1.5, star.axisErrors, -0.5, star.massErrors);
  writer.value(key, period, period * relativeError(star.periodErrors));
  return period;
};

const writeLimit = (star: Scratch, limit: HabitableLimit, key: string, writer: Writer): void => {
  const insolation = insolationAtLimit(limit, star.teff);
  if (Number.isNaN(star.luminosity) || Number.isNaN(insolation)) {
    const reason = Number.isNaN(star.teff)
      ? "needs-teff"
      : Number.isNaN(insolation)
        ? "outside-habitable-zone"
        : "needs-luminosity";
    writer.blank(key, reason);
    writer.blank(`${key}_period`, reason);
    return;
  }
  const distance = distanceAtInsolation(star.luminosity, insolation);
  combine(star.axisErrors, 0.5, star.luminosityErrors, 0, star.luminosityErrors);
  // The edge moves with temperature twice: through the light and through the model's limit.
  const viaLimit = (insolationSlope(limit, star.teff) * star.teff) / insolation;
  star.axisErrors[SOURCE.temperature] =
    (star.axisErrors[SOURCE.temperature] ?? 0) - 0.5 * viaLimit * (star.teffErrors[SOURCE.temperature] ?? 0);
  writer.value(key, distance, distance * relativeError(star.axisErrors));
  writePeriod(star, `${key}_period`, distance, writer);
};

const writeDepth = (star: Scratch, writer: Writer): void => {
  if (Number.isNaN(star.radius)) {
    writer.blank("earth_depth", "needs-radius");
    return;
  }
  const depth = depthPpm(1 / (EARTH_RADII_PER_SOLAR * star.radius));
  writer.value("earth_depth", depth, depth * 2 * relativeError(star.radiusErrors));
};

/** Probability and duration of a transit at the axis whose error vector stands in `star.axisErrors`. */
const writeTransit = (star: Scratch, axis: number, period: number, recipe: Recipe, writer: Writer): void => {
  if (Number.isNaN(star.radius)) {
    writer.blank("transit_probability", "needs-radius");
    writer.blank("transit_duration", "needs-radius");
    return;
  }
  const a = scaledAxis(axis, star.radius);
  const probability = transitProbability(a);
  if (Number.isNaN(probability)) {
    writer.blank("transit_probability", "orbit-inside-star");
    writer.blank("transit_duration", "orbit-inside-star");
    return;
  }
  combine(star.work, 1, star.radiusErrors, -1, star.axisErrors);
  writer.value("transit_probability", probability, probability * relativeError(star.work));
  if (Number.isNaN(period)) {
    writer.blank("transit_duration", "needs-mass");
    return;
  }
  const chord = recipe.duration === "central" ? 1 : MEAN_CHORD;
  const duration = chord * centralDuration(period * HOURS_PER_DAY, a);
  // T ≈ P R★ / (π a): the arcsine's own curvature is far below the errors.
  combine(star.work, 1, star.work, 1, star.periodErrors);
  writer.value("transit_duration", duration, duration * relativeError(star.work));
};

/** Habitable zone, the orbit of Earth's insolation, and a transit there. */
export const deriveHabitability = (star: Scratch, recipe: Recipe, writer: Writer): void => {
  writeLimit(star, "runaway-greenhouse", "hz_inner", writer);
  writeLimit(star, "maximum-greenhouse", "hz_outer", writer);
  writeDepth(star, writer);
  if (Number.isNaN(star.luminosity)) {
    for (const key of ["earth_distance", "earth_period", "transit_probability", "transit_duration"])
      writer.blank(key, "needs-luminosity");
    return;
  }
  const axis = distanceAtInsolation(star.luminosity, 1);
  combine(star.axisErrors, 0.5, star.luminosityErrors, 0, star.luminosityErrors);
  writer.value("earth_distance", axis, axis * relativeError(star.axisErrors));
  const period = writePeriod(star, "earth_period", axis, writer);
  writeTransit(star, axis, period, recipe, writer);
};
