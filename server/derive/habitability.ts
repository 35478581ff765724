import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import {
  distanceAtInsolation,
  type HabitableLimit,
  insolationAtLimit,
  insolationSlope,
} from "#shared/science/habitable-zone.ts";
import { periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { centralDuration, depthPpm, MEAN_CHORD, transitProbability } from "#shared/science/transit.ts";
import { addScaled, combine, relativeError, scale } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slot, Slots } from "./slots.ts";

const HOURS_PER_DAY = 24;

/** Period at an axis whose error vector stands in `star.axisErrors`; NaN where it is blank. */
const writePeriod = (star: Scratch, slot: Slot, axis: number): number => {
  if (Number.isNaN(star.mass)) {
    slot.blank(star.row, "needs-mass");
    return Number.NaN;
  }
  const period = periodFromAxis(axis, star.mass);
  combine(star.periodErrors, 1.5, star.axisErrors, -0.5, star.massErrors);
  slot.value(star.row, period, period * relativeError(star.periodErrors));
  return period;
};

const writeLimit = (star: Scratch, limit: HabitableLimit, edge: Slot, edgePeriod: Slot): void => {
  const insolation = insolationAtLimit(limit, star.teff);
  if (Number.isNaN(star.luminosity) || Number.isNaN(insolation)) {
    if (Number.isNaN(star.teff)) edge.blank(star.row, "needs-teff");
    else edge.blank(star.row, Number.isNaN(insolation) ? "outside-habitable-zone" : "needs-luminosity");
    edgePeriod.blankLike(star.row, edge);
    return;
  }
  const distance = distanceAtInsolation(star.luminosity, insolation);
  scale(star.axisErrors, 0.5, star.luminosityErrors);
  // The edge moves with temperature twice: through the light and through the model's limit.
  const viaLimit = (insolationSlope(limit, star.teff) * star.teff) / insolation;
  addScaled(star.axisErrors, -0.5 * viaLimit, star.teffErrors);
  edge.value(star.row, distance, distance * relativeError(star.axisErrors));
  writePeriod(star, edgePeriod, distance);
};

const writeDepth = (star: Scratch, out: Slots): void => {
  if (Number.isNaN(star.radius)) {
    out.earth_depth.blank(star.row, "needs-radius");
    return;
  }
  const depth = depthPpm(1 / (EARTH_RADII_PER_SOLAR * star.radius));
  out.earth_depth.value(star.row, depth, depth * 2 * relativeError(star.radiusErrors));
};

const writeDuration = (
  star: Scratch,
  a: number,
  period: number,
  recipe: RecipeSettings,
  out: Slots,
): void => {
  if (Number.isNaN(period)) {
    out.transit_duration.blank(star.row, "needs-mass");
    return;
  }
  const chord = recipe.duration === "central" ? 1 : MEAN_CHORD;
  const duration = chord * centralDuration(period * HOURS_PER_DAY, a);
  // T ≈ P R★ / (π a): the arcsine's own curvature is far below the errors. `work` holds R★ / a.
  addScaled(star.work, 1, star.periodErrors);
  out.transit_duration.value(star.row, duration, duration * relativeError(star.work));
};

/** Probability and duration of a transit at the axis whose error vector stands in `star.axisErrors`. */
const writeTransit = (
  star: Scratch,
  axis: number,
  period: number,
  recipe: RecipeSettings,
  out: Slots,
): void => {
  if (Number.isNaN(star.radius)) {
    out.transit_probability.blank(star.row, "needs-radius");
    out.transit_duration.blank(star.row, "needs-radius");
    return;
  }
  const a = scaledAxis(axis, star.radius);
  const probability = transitProbability(a);
  if (Number.isNaN(probability)) {
    out.transit_probability.blank(star.row, "orbit-inside-star");
    out.transit_duration.blank(star.row, "orbit-inside-star");
    return;
  }
  combine(star.work, 1, star.radiusErrors, -1, star.axisErrors);
  out.transit_probability.value(star.row, probability, probability * relativeError(star.work));
  writeDuration(star, a, period, recipe, out);
};

/** Habitable zone, the orbit of Earth's insolation, and a transit there. */
export const deriveHabitability = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  writeLimit(star, "runaway-greenhouse", out.hz_inner, out.hz_inner_period);
  writeLimit(star, "maximum-greenhouse", out.hz_outer, out.hz_outer_period);
  writeDepth(star, out);
  if (Number.isNaN(star.luminosity)) {
    out.earth_distance.blank(star.row, "needs-luminosity");
    out.earth_period.blank(star.row, "needs-luminosity");
    out.transit_probability.blank(star.row, "needs-luminosity");
    out.transit_duration.blank(star.row, "needs-luminosity");
    return;
  }
  const axis = distanceAtInsolation(star.luminosity, 1);
  scale(star.axisErrors, 0.5, star.luminosityErrors);
  out.earth_distance.value(star.row, axis, axis * relativeError(star.axisErrors));
  const period = writePeriod(star, out.earth_period, axis);
  writeTransit(star, axis, period, recipe, out);
};
