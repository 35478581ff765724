import type { WorkingInput } from "#shared/api/workings.ts";
import { PRESENT } from "#shared/catalogue/blank-reasons.ts";
import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import {
  MEAN_CHORD_IMPACT,
  smallestPlanet,
  statisticOf,
  trapezoidDuration,
} from "#shared/science/detection.ts";
import { hourlyNoiseOfSignal, redNoiseOf } from "#shared/science/noise.ts";
import { scaledAxis } from "#shared/science/orbit.ts";
import type { AssessedStar } from "./assess.ts";
import { noiseSteps } from "./noise-steps.ts";
import { derived, input, ofCard, type Seen, type SeenStep } from "./seen.ts";

const transitsStep = ({ star, assessment, campaign }: Seen): SeenStep => ({
  key: "transits",
  symbol: "N",
  label: "transits in the campaign",
  unit: "",
  value: assessment.transits,
  formula: "floor(length * duty / P_E * (1 + 1e-12))",
  inputs: [
    ofCard("length", "length of the campaign", "d", campaign.lengthDays),
    ofCard("duty", "share of the time that is observed", "", campaign.duty),
    input("derived", "P_E", "period at Earth's insolation", "d", star.earthPeriod, "earth_period"),
  ],
  reference: "Whole periods in the observed time; the factor undoes the rounding of binary fractions.",
});

const share = (star: AssessedStar): WorkingInput =>
  Number.isNaN(star.lightShare)
    ? input("assumed", "share", "light share, not known: the star counts as alone", "", 1)
    : input("given", "share", "light share, F_target / F_total", "", star.lightShare);

const PLANET = "k_E * R * sqrt(SNR * 1e-6 * sigma / (sqrt(N * T_sig) * share))";

/** The noise that counts; red noise is more in a long transit than in an hour. */
const signalNoiseStep = ({ star, assessment, card }: Seen): SeenStep => ({
  key: "noise_signal",
  symbol: "sigma",
  label: "noise of the whole signal, as of one hour",
  unit: "ppm",
  value: hourlyNoiseOfSignal(card, assessment.noise1h, star.duration),
  formula: "sqrt((sigma_1h^2 - sigma_red^2) / T + sigma_red^2) * sqrt(T)",
  inputs: [
    input("derived", "sigma_1h", "noise in one hour", "ppm", assessment.noise1h, "noise_1h"),
    ofCard("sigma_red", "red noise", "ppm", redNoiseOf(card)),
    input("derived", "T", "duration of the transit", "h", star.duration, "transit_duration"),
  ],
  reference: "Pont, Zucker & Queloz 2006, MNRAS 373, 231.",
});

const noiseInput = (seen: Seen): WorkingInput =>
  redNoiseOf(seen.card) === 0
    ? input("derived", "sigma", "noise in one hour", "ppm", seen.assessment.noise1h, "noise_1h")
    : derived(signalNoiseStep(seen));

const planetInputs = (seen: Seen): WorkingInput[] => [
  input("derived", "R", "radius of the star", "solRad", seen.star.radius, "radius"),
  ofCard("SNR", "signal-to-noise ratio of a detection", "", seen.campaign.snrLimit),
  noiseInput(seen),
  input("derived", "N", "transits in the campaign", "", seen.assessment.transits, "transits"),
  share(seen.star),
];

const EARTHS = {
  symbol: "k_E",
  value: EARTH_RADII_PER_SOLAR,
  unit: "earthRad",
  source: "Nominal solar radius in equatorial radii of the Earth, IAU 2015 Resolution B3",
};

const JENKINS = "Jenkins 2002, ApJ 575, 493: the multiple-event statistic, solved for the radius.";

const boxStep = (
  seen: Seen,
  key: string,
  symbol: string,
  label: string,
  value: number,
  weighed: WorkingInput,
): SeenStep => ({
  key,
  symbol,
  label,
  unit: "earthRad",
  value,
  formula: PLANET,
  inputs: [...planetInputs(seen), weighed],
  constants: [EARTHS],
  reference: JENKINS,
});

const duration = (star: AssessedStar): WorkingInput =>
  input(
    "derived",
    "T_sig",
    "duration of the transit, all of it a box",
    "h",
    star.duration,
    "transit_duration",
  );

/** Half the angle from contact to contact: outer (+) or inner (−), which a transit that grazes does not have. */
const crossing = (sign: "+" | "-"): string =>
  `asin(min(1, sqrt(max(0, (1 ${sign} R_box / (k_E * R))^2 - b^2) / (a_R^2 - b^2))))`;

/** Box first: the trapezoid of a planet of that radius gives the time that counts. */
const trapezoidSteps = (seen: Seen): SeenStep[] => {
  const { star, assessment, card, campaign, recipe } = seen;
  const lightShare = Number.isNaN(star.lightShare) ? 1 : star.lightShare;
  const box = smallestPlanet(
    star.radius,
    campaign.snrLimit,
    hourlyNoiseOfSignal(card, assessment.noise1h, star.duration),
    assessment.transits,
    star.duration,
    lightShare,
  );
  const boxed = boxStep(seen, "box_radius", "R_box", "smallest planet of a box", box, duration(star));
  const b = recipe.duration === "central" ? 0 : MEAN_CHORD_IMPACT;
  const a = scaledAxis(star.earthDistance, star.radius);
  const k = box / (EARTH_RADII_PER_SOLAR * star.radius);
  const signal: SeenStep = {
    key: "signal_hours",
    symbol: "T_sig",
    label: "time that carries the signal, (T14 + 2 T23) / 3",
    unit: "h",
    value: trapezoidDuration(24 * star.earthPeriod, a, k, b),
    formula: `24 * P_E / pi / 3 * (${crossing("+")} + 2 * ${crossing("-")})`,
    inputs: [
      input("derived", "P_E", "period at Earth's insolation", "d", star.earthPeriod, "earth_period"),
      derived(boxed),
      input("derived", "R", "radius of the star", "solRad", star.radius, "radius"),
      input(
        "recipe",
        "b",
        "impact parameter: 0 through the centre, that of the mean chord on average",
        "",
        b,
      ),
      input("derived", "a_R", "semi-major axis over stellar radius", "", a, "scaled_axis"),
    ],
    constants: [EARTHS],
    reference:
      "Kipping 2023, arXiv:2305.06790, for the weight; Winn 2010, arXiv:1001.2010, for the durations.",
  };
  return [
    boxStep(seen, "r_min", "R_min", "smallest planet found", assessment.rMin, derived(signal)),
    signal,
    boxed,
  ];
};

const planetSteps = (seen: Seen): SeenStep[] =>
  statisticOf(seen.campaign, seen.recipe) === "boxcar"
    ? [boxStep(seen, "r_min", "R_min", "smallest planet found", seen.assessment.rMin, duration(seen.star))]
    : trapezoidSteps(seen);

/** Numbers on the way to a blank are no values: they may lie outside what the card or the campaign allows. */
const blanked = (steps: readonly SeenStep[], blank: number): readonly SeenStep[] =>
  blank === PRESENT ? steps : steps.map((step) => ({ ...step, value: Number.NaN }));

/** Every step towards the instrument's quantities of one star, by key. */
export const seenSteps = (seen: Seen): ReadonlyMap<string, SeenStep> => {
  const { rMinBlank, noiseBlank } = seen.assessment;
  const steps = [
    ...blanked([...planetSteps(seen), signalNoiseStep(seen)], rMinBlank),
    transitsStep(seen),
    ...blanked(noiseSteps(seen), noiseBlank),
  ];
  return new Map(steps.map((step) => [step.key, step]));
};
