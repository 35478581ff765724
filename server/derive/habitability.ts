import { AU_PER_SOLAR_RADIUS, EARTH_RADII_PER_SOLAR, GAUSSIAN_YEAR_D } from "#shared/science/constants.ts";
import {
  distanceAtInsolation,
  HABITABLE_ZONE_COEFFICIENTS,
  HABITABLE_ZONE_TEFF_K,
  HABITABLE_ZONE_ZERO_POINT_K,
  type HabitableLimit,
  insolationAtLimit,
  insolationSlope,
} from "#shared/science/habitable-zone.ts";
import { periodFromAxis, scaledAxis } from "#shared/science/orbit.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { centralDuration, depthPpm, MEAN_CHORD, transitProbability } from "#shared/science/transit.ts";
import { type Definition, type DefinitionOf, type FormulaConstant, only } from "./definition.ts";
import { polynomial, shifted } from "./formula-text.ts";
import { addScaled, combine, relativeError, scale } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slot, Slots } from "./slots.ts";
import type { SymbolKey } from "./symbols.ts";

const HOURS_PER_DAY = 24;

const YEAR: FormulaConstant = {
  symbol: "P_1",
  value: GAUSSIAN_YEAR_D,
  unit: "d",
  source: "Period at 1 au from one solar mass, from the nominal values of IAU 2015 Resolution B3",
};
const AU: FormulaConstant = {
  symbol: "k_au",
  value: AU_PER_SOLAR_RADIUS,
  unit: "solRad",
  source: "Astronomical unit in nominal solar radii, IAU 2012 Resolution B2 and IAU 2015 Resolution B3",
};
const EARTHS: FormulaConstant = {
  symbol: "k_E",
  value: EARTH_RADII_PER_SOLAR,
  unit: "earthRad",
  source: "Nominal solar radius in equatorial radii of the Earth, IAU 2015 Resolution B3",
};

const KOPPARAPU = "Kopparapu et al. 2014, ApJ 787, L29, eq. 4 and Table 1";
const LIMIT_WORDS: Readonly<Record<HabitableLimit, string>> = {
  "recent-venus": "recent Venus",
  "runaway-greenhouse": "runaway greenhouse, 1 Earth mass",
  "runaway-greenhouse-5-earths": "runaway greenhouse, 5 Earth masses",
  "runaway-greenhouse-0.1-earths": "runaway greenhouse, 0.1 Earth masses",
  "maximum-greenhouse": "maximum greenhouse",
  "early-mars": "early Mars",
};

const insolation = (limit: HabitableLimit): Definition => ({
  method: null,
  formula: polynomial(shifted("T_eff", HABITABLE_ZONE_ZERO_POINT_K), HABITABLE_ZONE_COEFFICIENTS[limit]),
  inputs: ["T_eff"],
  ranges: () => [{ symbol: "T_eff", from: HABITABLE_ZONE_TEFF_K.coolest, to: HABITABLE_ZONE_TEFF_K.hottest }],
  reference: `${KOPPARAPU}: ${LIMIT_WORDS[limit]}.`,
  compute: ({ teff }) => insolationAtLimit(limit, teff),
});

const INSOLATION = Object.fromEntries(
  (Object.keys(LIMIT_WORDS) as HabitableLimit[]).map((limit) => [limit, insolation(limit)]),
) as Readonly<Record<HabitableLimit, Definition>>;

const edge = (at: "S_in" | "S_out", compute: Definition["compute"]): Definition => ({
  method: null,
  formula: `sqrt(L / ${at})`,
  inputs: ["L", at],
  reference: "Kopparapu et al. 2014, ApJ 787, L29, eq. 5.",
  compute,
});

const INNER = edge("S_in", (s) => distanceAtInsolation(s.luminosity, s.insolationInner));
const OUTER = edge("S_out", (s) => distanceAtInsolation(s.luminosity, s.insolationOuter));

const EARTH_DISTANCE: Definition = {
  method: null,
  formula: "sqrt(L)",
  inputs: ["L"],
  reference: "Inverse-square law; Earth's insolation at 1 au from one solar luminosity.",
  compute: ({ luminosity }) => distanceAtInsolation(luminosity, 1),
};

const period = (axis: SymbolKey, compute: Definition["compute"]): Definition => ({
  method: null,
  formula: `P_1 * sqrt(${axis}^3 / M)`,
  inputs: [axis, "M"],
  constants: [YEAR],
  reference: "Kepler's third law for a light planet.",
  compute,
});

const INNER_PERIOD = period("a_in", (s) => periodFromAxis(s.innerAxis, s.mass));
const OUTER_PERIOD = period("a_out", (s) => periodFromAxis(s.outerAxis, s.mass));
const EARTH_PERIOD = period("a_E", (s) => periodFromAxis(s.earthAxis, s.mass));

const SCALED_AXIS: Definition = {
  method: null,
  formula: "a_E * k_au / R",
  inputs: ["a_E", "R"],
  constants: [AU],
  reference: "Semi-major axis in stellar radii.",
  compute: ({ earthAxis, radius }) => scaledAxis(earthAxis, radius),
};

/** Probabilities end at 1: an eccentric orbit's mean may not exceed it. */
const PROBABILITY: Definition = {
  method: null,
  formula: "min(1, k_P / a_R)",
  inputs: ["k_P", "a_R"],
  reference:
    "Winn 2010, arXiv:1001.2010, eq. 9 (number from memory), for the planet's centre; Barnes 2007, PASP 119, 986, for eccentric orbits.",
  compute: (s) => Math.min(1, s.probabilityFactor * transitProbability(s.scaledAxis)),
};

const DURATION: Definition = {
  method: null,
  formula: "k_chord * k_T * 24 * P_E / pi * asin(1 / a_R)",
  inputs: ["k_chord", "k_T", "P_E", "a_R"],
  reference: "Winn 2010, arXiv:1001.2010, eq. 14 (number from memory), for a small planet.",
  compute: (s, recipe) =>
    (recipe.duration === "central" ? 1 : MEAN_CHORD) *
    s.durationFactor *
    centralDuration(HOURS_PER_DAY * s.earthPeriod, s.scaledAxis),
};

const DEPTH: Definition = {
  method: null,
  formula: "1e6 * (1 / (k_E * R))^2",
  inputs: ["R"],
  constants: [EARTHS],
  reference: "Ratio of the areas of planet and star, without limb darkening.",
  compute: ({ radius }) => depthPpm(1 / (EARTH_RADII_PER_SOLAR * radius)),
};

export const HABITABILITY_DEFINITIONS = {
  insolation_inner: (_star, { habitableZone }) => INSOLATION[habitableZone.inner],
  insolation_outer: (_star, { habitableZone }) => INSOLATION[habitableZone.outer],
  hz_inner: only(INNER),
  hz_outer: only(OUTER),
  hz_inner_period: only(INNER_PERIOD),
  hz_outer_period: only(OUTER_PERIOD),
  earth_distance: only(EARTH_DISTANCE),
  earth_period: only(EARTH_PERIOD),
  scaled_axis: only(SCALED_AXIS),
  transit_probability: only(PROBABILITY),
  transit_duration: only(DURATION),
  earth_depth: only(DEPTH),
} satisfies Record<string, DefinitionOf>;

/** Writes a period at an axis whose error vector stands in `star.axisErrors`. */
const writePeriod = (star: Scratch, slot: Slot, days: number): void => {
  if (Number.isNaN(star.mass)) {
    slot.blank(star.row, "needs-mass");
    return;
  }
  combine(star.periodErrors, 1.5, star.axisErrors, -0.5, star.massErrors);
  slot.value(star.row, days, star.periodErrors);
};

/** Writes an edge of the zone; false where it is blank. */
const writeEdge = (
  star: Scratch,
  limit: HabitableLimit,
  received: number,
  axis: number,
  slot: Slot,
): boolean => {
  if (Number.isNaN(star.luminosity) || Number.isNaN(received)) {
    if (Number.isNaN(star.teff)) slot.blank(star.row, "needs-teff");
    else slot.blank(star.row, Number.isNaN(received) ? "outside-habitable-zone" : "needs-luminosity");
    return false;
  }
  scale(star.axisErrors, 0.5, star.luminosityErrors);
  // The edge moves with temperature twice: through the light and through the model's limit.
  const viaLimit = (insolationSlope(limit, star.teff) * star.teff) / received;
  addScaled(star.axisErrors, -0.5 * viaLimit, star.teffErrors);
  slot.value(star.row, axis, star.axisErrors);
  return true;
};

const writeZone = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  const { inner, outer } = recipe.habitableZone;
  star.insolationInner = INSOLATION[inner].compute(star, recipe);
  star.insolationOuter = INSOLATION[outer].compute(star, recipe);
  star.innerAxis = INNER.compute(star, recipe);
  star.outerAxis = OUTER.compute(star, recipe);
  star.innerPeriod = INNER_PERIOD.compute(star, recipe);
  star.outerPeriod = OUTER_PERIOD.compute(star, recipe);
  if (writeEdge(star, inner, star.insolationInner, star.innerAxis, out.hz_inner))
    writePeriod(star, out.hz_inner_period, star.innerPeriod);
  else out.hz_inner_period.blankLike(star.row, out.hz_inner);
  if (writeEdge(star, outer, star.insolationOuter, star.outerAxis, out.hz_outer))
    writePeriod(star, out.hz_outer_period, star.outerPeriod);
  else out.hz_outer_period.blankLike(star.row, out.hz_outer);
};

const writeDepth = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  star.depth = DEPTH.compute(star, recipe);
  if (Number.isNaN(star.radius)) {
    out.earth_depth.blank(star.row, "needs-radius");
    return;
  }
  scale(star.work, 2, star.radiusErrors);
  out.earth_depth.value(star.row, star.depth, star.work);
};

/** `star.work` holds R★ / a. */
const writeDuration = (star: Scratch, out: Slots): void => {
  if (Number.isNaN(star.earthPeriod)) {
    out.transit_duration.blank(star.row, "needs-mass");
    return;
  }
  // T ≈ P R★ / (π a): the arcsine's own curvature is far below the errors.
  addScaled(star.work, 1, star.periodErrors);
  out.transit_duration.value(star.row, star.duration, star.work);
  combine(star.work, 1, star.radiusErrors, -0.25, star.work);
  star.reachError = relativeError(star.work);
};

/** Probability and duration of a transit at the axis whose error vector stands in `star.axisErrors`. */
const writeTransit = (star: Scratch, out: Slots): void => {
  if (Number.isNaN(star.radius) || Number.isNaN(star.probability)) {
    const reason = Number.isNaN(star.radius) ? "needs-radius" : "orbit-inside-star";
    out.transit_probability.blank(star.row, reason);
    out.transit_duration.blank(star.row, reason);
    return;
  }
  combine(star.work, 1, star.radiusErrors, -1, star.axisErrors);
  out.transit_probability.value(star.row, star.probability, star.work);
  writeDuration(star, out);
};

const writeEarthOrbit = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  star.earthAxis = EARTH_DISTANCE.compute(star, recipe);
  star.earthPeriod = EARTH_PERIOD.compute(star, recipe);
  star.scaledAxis = SCALED_AXIS.compute(star, recipe);
  star.probability = PROBABILITY.compute(star, recipe);
  star.duration = DURATION.compute(star, recipe);
  star.reachError = Number.NaN;
  if (Number.isNaN(star.luminosity)) {
    out.earth_distance.blank(star.row, "needs-luminosity");
    out.earth_period.blank(star.row, "needs-luminosity");
    out.transit_probability.blank(star.row, "needs-luminosity");
    out.transit_duration.blank(star.row, "needs-luminosity");
    return;
  }
  scale(star.axisErrors, 0.5, star.luminosityErrors);
  out.earth_distance.value(star.row, star.earthAxis, star.axisErrors);
  writePeriod(star, out.earth_period, star.earthPeriod);
  writeTransit(star, out);
};

/** Habitable zone, the orbit of Earth's insolation, and a transit there. */
export const deriveHabitability = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  writeZone(star, recipe, out);
  writeDepth(star, recipe, out);
  writeEarthOrbit(star, recipe, out);
};
