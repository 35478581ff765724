import type { BlankKey } from "#shared/catalogue/blank-reasons.ts";
import { absoluteMagnitude, distanceFromParallax } from "#shared/science/distance.ts";
import { modeOfDistance, quantilesOfDistance } from "#shared/science/distance-prior.ts";
import {
  BP_RP_REDDENING,
  EXTINCTION_COEFFICIENTS,
  type ExtinctionBand,
  extinction,
  extinctionSlope,
} from "#shared/science/extinction.ts";
import type { DistanceMethod, RecipeSettings } from "#shared/science/recipes.ts";
import { byMethod, type Definition, type DefinitionOf, only } from "./definition.ts";
import { judgeDwarf } from "./dwarf.ts";
import { polynomial } from "./formula-text.ts";
import { at, errorAt, type Inputs } from "./inputs.ts";
import { SOURCE, setMagnitudeErrors } from "./relative-error.ts";
import type { Scratch } from "./scratch.ts";
import type { Slots } from "./slots.ts";

const GIVEN_DISTANCE: Definition = {
  method: "given-distance",
  formula: "d_given",
  inputs: ["d_given"],
  reference: "As given by the preferred extract.",
  compute: (star) => (star.distanceGiven > 0 ? star.distanceGiven : Number.NaN),
};

const INVERSION: Definition = {
  method: "inversion",
  formula: "1000 / (plx - zp)",
  inputs: ["plx", "zp"],
  ranges: ({ distance }) => [{ symbol: "f_plx", from: 0, to: distance.fractionLimit }],
  reference: "Lutz & Kelker 1973, PASP 85, 573; Luri et al. 2018, A&A 616, A9, on when an inverse is fair.",
  compute: (star, { distance }) =>
    distanceFromParallax(star.parallax, star.parallaxError, distance.fractionLimit, distance.zeroPointMas),
};

const VOLUME_PRIOR: Definition = {
  method: "volume-prior",
  formula: "d^3 / L_prior - 2 * d^2 + 1000 * (plx - zp) / sigma_plx^2 * d - 1e6 / sigma_plx^2",
  isRoot: true,
  inputs: ["plx", "zp", "sigma_plx", "L_prior"],
  reference:
    "Bailer-Jones 2015, PASP 127, 994, eq. 19: the most probable distance is the smallest positive root; half the interval from 16 to 84 % stands as its error.",
  compute: (star, { distance }) =>
    modeOfDistance(star.parallax - distance.zeroPointMas, star.parallaxError, distance.priorLengthPc),
};

const DISTANCES: Readonly<Record<DistanceMethod, Definition>> = {
  "given-distance": GIVEN_DISTANCE,
  inversion: INVERSION,
  "volume-prior": VOLUME_PRIOR,
};

const EXTINCTION_REFERENCE = "Casagrande et al. 2021, MNRAS 507, 2684 (law of Fitzpatrick, scaled).";

const EXTINCTION_KS: Definition = {
  method: null,
  formula: `${EXTINCTION_COEFFICIENTS.ks[0]} * E_BV`,
  inputs: ["E_BV"],
  reference: EXTINCTION_REFERENCE,
  compute: ({ ebv }) => extinction("ks", ebv, Number.NaN),
};

const EXTINCTION_G: Definition = {
  method: null,
  formula: `(${polynomial("c_0", EXTINCTION_COEFFICIENTS.g)}) * E_BV`,
  inputs: ["c_0", "E_BV"],
  reference: EXTINCTION_REFERENCE,
  compute: (star) => extinctionOf(star, "g"),
};

const distanceModulus = (
  apparent: "Ks" | "G",
  dimming: "A_Ks" | "A_G",
  of: Definition["compute"],
): Definition => ({
  method: null,
  formula: `${apparent} + 5 - 5 * log10(d) - ${dimming}`,
  inputs: [apparent, "d", dimming],
  reference: "Definition of absolute magnitude.",
  compute: of,
});

const ABS_KS = distanceModulus("Ks", "A_Ks", (s) => absoluteMagnitude(s.ks, s.distance, s.extinctionKs));
const ABS_G = distanceModulus("G", "A_G", (s) => absoluteMagnitude(s.g, s.distance, s.extinctionG));

const BP_RP: Definition = {
  method: null,
  formula: "BP - RP - R_BP_RP * E_BV",
  inputs: ["BP", "RP", "R_BP_RP", "E_BV"],
  reference: EXTINCTION_REFERENCE,
  compute: (star) => star.bp - star.rp - star.bpRpPerExcess * star.ebv,
};

export const BRIGHTNESS_DEFINITIONS = {
  distance: byMethod(...Object.values(DISTANCES)),
  extinction_ks: only(EXTINCTION_KS),
  extinction_g: only(EXTINCTION_G),
  abs_ks: only(ABS_KS),
  abs_g: only(ABS_G),
  bp_rp: only(BP_RP),
} satisfies Record<string, DefinitionOf>;

/** Extinction of this star in a band, mag; 0 where nothing reddens it. */
const extinctionOf = (star: Scratch, band: ExtinctionBand): number =>
  star.ebv === 0 ? 0 : extinction(band, star.ebv, star.bp - star.rp);

/** V has no coefficient in that law; 3.1 is the usual ratio of extinction to reddening (common practice, no source). */
const V_PER_EXCESS = 3.1;

/** Extinction in a band per E(B − V); 0 where nothing reddens the star. */
export const perExcess = (star: Scratch, band: ExtinctionBand | "v"): number => {
  if (star.ebv === 0) return 0;
  return band === "v" ? V_PER_EXCESS : extinctionOf(star, band) / star.ebv;
};

/**
 * Change of the extinction in a band per E(B − V); 0 where the excess has no error. What the errors of BP and RP add through
 * the coefficients is left out: it is a few percent of what they do to the colour itself.
 */
export const dimmingSlope = (star: Scratch, band: ExtinctionBand | "v"): number => {
  if (star.ebvError === 0 && star.ebvDistanceError === 0) return 0;
  return band === "v" ? V_PER_EXCESS : extinctionSlope(band, star.ebv, star.bp - star.rp);
};

/** Why a parallax gives no distance. */
const distanceReason = (parallax: number, error: number): BlankKey => {
  if (Number.isNaN(parallax)) return "needs-parallax";
  if (parallax <= 0) return "parallax-not-positive";
  return Number.isNaN(error) ? "needs-parallax-error" : "parallax-too-uncertain";
};

const readGiven = (star: Scratch, given: Inputs, { assumed }: RecipeSettings): void => {
  const { row } = star;
  star.parallax = at(given.parallax, row);
  star.parallaxError = errorAt(given.parallaxError, row);
  star.distanceGiven = at(given.distance, row);
  star.distanceGivenError = errorAt(given.distanceError, row);
  star.g = at(given.g, row);
  star.gError = errorAt(given.gError, row);
  star.bp = at(given.bp, row);
  star.bpError = errorAt(given.bpError, row);
  star.rp = at(given.rp, row);
  star.rpError = errorAt(given.rpError, row);
  star.ks = at(given.ks, row);
  star.ksError = errorAt(given.ksError, row);
  star.v = at(given.v, row);
  star.vError = errorAt(given.vError, row);
  star.j = at(given.j, row);
  star.jError = errorAt(given.jError, row);
  star.h = at(given.h, row);
  star.hError = errorAt(given.hError, row);
  const logg = at(given.logg, row);
  const feh = at(given.feh, row);
  star.hasLogg = !Number.isNaN(logg);
  star.hasFeh = !Number.isNaN(feh);
  star.logg = star.hasLogg ? logg : assumed.logg + assumed.loggError * star.deviates.gravity;
  star.loggError = star.hasLogg ? errorAt(given.loggError, row) : assumed.loggError;
  star.feh = star.hasFeh ? feh : assumed.feh + assumed.fehError * star.deviates.iron;
  star.fehError = star.hasFeh ? errorAt(given.fehError, row) : assumed.fehError;
  star.isAssumed = false;
};

/** Relative error of the distance by the method that gave it. */
const distanceError = (star: Scratch, method: DistanceMethod, { distance }: RecipeSettings): number => {
  if (method === "given-distance") return star.distanceGivenError / star.distance;
  const parallax = star.parallax - distance.zeroPointMas;
  if (method === "inversion") return star.parallaxError / parallax;
  const [low = Number.NaN, high = Number.NaN] = quantilesOfDistance(
    parallax,
    star.parallaxError,
    distance.priorLengthPc,
    [0.16, 0.84],
  );
  return (high - low) / 2 / star.distance;
};

const writeDistance = (star: Scratch, recipe: RecipeSettings, out: Slots): void => {
  star.work.fill(0);
  for (const method of recipe.distance.order) {
    star.distance = DISTANCES[method].compute(star, recipe);
    if (Number.isNaN(star.distance)) continue;
    star.distanceError = distanceError(star, method, recipe);
    star.work[SOURCE.parallax] = star.distanceError;
    out.distance.method(star.row, method);
    if (method === "given-distance") out.distance.given(star.row, star.distance, star.distanceGivenError);
    else out.distance.value(star.row, star.distance, star.work);
    return;
  }
  star.distanceError = Number.NaN;
  const parallax = star.parallax - recipe.distance.zeroPointMas;
  out.distance.blank(star.row, distanceReason(parallax, star.parallaxError));
};

/** Colour excess by the recipe's rule; a star whose extract gives none counts as not reddened. */
const redden = (star: Scratch, given: Inputs, rule: RecipeSettings["extinction"]): void => {
  star.ebv = 0;
  star.ebvError = 0;
  star.ebvDistanceError = 0;
  if (rule.rule === "constant") star.ebv = rule.ebv;
  else if (rule.rule === "by-distance") {
    star.ebv = (rule.ebvPerKpc * star.distance) / 1000;
    star.ebvDistanceError = star.ebv * star.distanceError;
  } else if (rule.rule === "column") {
    const ebv = at(given.ebv, star.row);
    if (Number.isNaN(ebv)) return;
    star.ebv = ebv;
    star.ebvError = errorAt(given.ebvError, star.row);
  }
};

const dim = (star: Scratch, recipe: RecipeSettings): void => {
  star.firstColour = star.bp - star.rp - BP_RP_REDDENING * star.ebv;
  star.extinctionKs = star.ebv === 0 ? 0 : EXTINCTION_KS.compute(star, recipe);
  star.extinctionG = EXTINCTION_G.compute(star, recipe);
  star.bpRpPerExcess = perExcess(star, "bp") - perExcess(star, "rp");
  star.bpRp = BP_RP.compute(star, recipe);
};

const writeAbsoluteKs = (star: Scratch, out: Slots): void => {
  if (Number.isNaN(star.ks)) out.abs_ks.blank(star.row, "needs-ks");
  else if (Number.isNaN(star.distance)) out.abs_ks.blank(star.row, "needs-distance");
  else if (Number.isNaN(star.extinctionKs)) out.abs_ks.blank(star.row, "outside-extinction");
  else {
    setMagnitudeErrors(star.work, 1, star, SOURCE.ks, star.ksError, EXTINCTION_COEFFICIENTS.ks[0]);
    out.abs_ks.magnitude(star.row, star.absKs, star.work);
  }
};

/** Distance and absolute magnitudes, and whether the star can be a dwarf. */
export const deriveDistance = (star: Scratch, given: Inputs, recipe: RecipeSettings, out: Slots): void => {
  readGiven(star, given, recipe);
  writeDistance(star, recipe, out);
  redden(star, given, recipe.extinction);
  dim(star, recipe);
  star.absKs = ABS_KS.compute(star, recipe);
  star.absG = ABS_G.compute(star, recipe);
  writeAbsoluteKs(star, out);
  judgeDwarf(star);
};
