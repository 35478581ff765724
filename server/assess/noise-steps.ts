import type { WorkingInput } from "#shared/api/workings.ts";
import type { DetectorCard, FormulaCard } from "#shared/science/cards.ts";
import { pixelWeight } from "#shared/science/ccd.ts";
import { type NoiseParts, noiseParts } from "#shared/science/noise.ts";
import { electronRate, PHOTON_BANDS } from "#shared/science/passbands.ts";
import { comparisonFactor, OSBORN_COEFFICIENT } from "#shared/science/scintillation.ts";
import { derived, input, ofCard, type Seen, type SeenStep } from "./seen.ts";

const magnitude = ({ star, card }: Seen): WorkingInput => ({
  ...input("given", "m", `magnitude in the passband of the card (${card.passband})`, "mag", star.magnitude),
  error: Number.isNaN(star.magnitudeError) ? null : star.magnitudeError,
});

const formulaNoise = (seen: Seen, card: FormulaCard): SeenStep[] => [
  {
    key: "noise_1h",
    symbol: "sigma",
    label: "noise in one hour",
    unit: "ppm",
    value: seen.assessment.noise1h,
    formula:
      "sqrt((sigma_ph * 10^(0.2 * (m - m_0)))^2 + (sigma_bg * 10^(0.4 * (m - m_0)))^2 + sigma_floor^2)",
    inputs: [
      magnitude(seen),
      ofCard("m_0", "reference magnitude", "mag", card.referenceMagnitude),
      ofCard("sigma_ph", "photon noise there", "ppm", card.photonPpm),
      ofCard("sigma_bg", "background noise there", "ppm", card.backgroundPpm),
      ofCard("sigma_floor", "floor", "ppm", card.floorPpm),
    ],
    reference: "The instrument card's curve; the terms add in quadrature.",
  },
];

const HOWELL =
  "Howell 2006, Handbook of CCD Astronomy, 2nd ed., 4.4; Merline & Howell 1995, Exp. Astron. 6, 163.";
const TELESCOPE = "W * pi / 4 * (100 * D)^2 * (1 - eps^2) * eta";

const telescope = (card: DetectorCard): WorkingInput[] => [
  ofCard(
    "N_0",
    `photons per s, cm² and Å at magnitude 0 in ${card.photonBand}`,
    "s-1.cm-2.Angstrom-1",
    PHOTON_BANDS[card.photonBand][card.magnitudeSystem === "ab" ? "photonRateAb" : "photonRate"],
  ),
  ofCard("W", "width of the band", "Angstrom", PHOTON_BANDS[card.photonBand].widthAngstrom),
  ofCard("D", "aperture", "m", card.apertureM),
  ofCard("eps", "central obstruction", "", card.obstruction),
  ofCard("eta", "throughput", "", card.throughput),
  ofCard("t", "exposure", "s", card.exposureS),
];

/** Electrons of one exposure, and how many exposures an hour has. */
const counts = (seen: Seen, card: DetectorCard) => {
  const band = PHOTON_BANDS[card.photonBand];
  const { apertureM, obstruction, throughput, exposureS, magnitudeSystem } = card;
  const of = (mag: number, extinction: number): number =>
    electronRate(mag, band, apertureM, obstruction, throughput, extinction, magnitudeSystem) * exposureS;
  const star: SeenStep = {
    key: "electrons_star",
    symbol: "n_star",
    label: "electrons from the star in one exposure",
    unit: "",
    value: of(seen.star.magnitude, card.extinction * card.airmass),
    formula: `N_0 * 10^(-0.4 * (m + k * X)) * ${TELESCOPE} * t`,
    inputs: [
      magnitude(seen),
      ...telescope(card),
      ofCard("k", "extinction per airmass", "mag", card.extinction),
      ofCard("X", "airmass", "", card.airmass),
    ],
    reference: "Photon rates from public transmission curves and the spectrum of Vega.",
  };
  const sky: SeenStep = {
    key: "electrons_sky",
    symbol: "n_sky",
    label: "electrons from the sky in one pixel and exposure",
    unit: "",
    value: of(card.skyBrightness, 0) * card.pixelScale ** 2,
    formula: `N_0 * 10^(-0.4 * mu) * ${TELESCOPE} * t * s^2`,
    inputs: [
      ...telescope(card),
      ofCard("mu", "sky brightness", "mag per square arcsecond", card.skyBrightness),
      ofCard("s", "pixel scale", "arcsec", card.pixelScale),
    ],
    reference: "Photon rates as for the star; no extinction, as the brightness is measured from the ground.",
  };
  const exposures: SeenStep = {
    key: "exposures",
    symbol: "n_exp",
    label: "exposures in an hour",
    unit: "",
    value: 3600 / (card.exposureS + card.overheadS),
    formula: "3600 / (t + t_o)",
    inputs: [
      ofCard("t", "exposure", "s", card.exposureS),
      ofCard("t_o", "time between exposures", "s", card.overheadS),
    ],
    reference: "Time on the star.",
  };
  const weight: SeenStep = {
    key: "pixel_weight",
    symbol: "w",
    label: "pixels of the aperture, weighed for a sky measured in few",
    unit: "",
    value: pixelWeight(Math.PI * card.apertureRadiusPx ** 2, card.skyPixels),
    formula: "pi * r^2 * (1 + pi * r^2 / n_B)",
    inputs: [
      ofCard("r", "radius of the aperture", "pix", card.apertureRadiusPx),
      ofCard("n_B", "pixels of the sky", "", card.skyPixels),
    ],
    reference: HOWELL,
  };
  return { star, sky, exposures, weight };
};

/** Scintillation of one exposure, ppm, by the card's law. */
const twinkleFormula = (card: DetectorCard): string => {
  if (card.siteAltitudeM === null) return "0";
  return card.scintillationLaw === "osborn"
    ? "1e6 * sqrt(1e-5) * C_Y * D^(-2/3) * X^1.5 * exp(-h / 8000) / sqrt(t)"
    : "1e6 * 0.09 * (100 * D)^(-2/3) * X^1.75 * exp(-h / 8000) / sqrt(2 * t)";
};

const twinkleInputs = (card: DetectorCard): WorkingInput[] =>
  card.siteAltitudeM === null
    ? []
    : [
        ofCard("D", "aperture", "m", card.apertureM),
        ofCard("X", "airmass", "", card.airmass),
        ofCard("h", "altitude of the site", "m", card.siteAltitudeM),
        ofCard("t", "exposure", "s", card.exposureS),
        ...(card.scintillationLaw === "osborn"
          ? [
              ofCard(
                "C_Y",
                "coefficient of the site",
                "",
                card.scintillationCoefficient ?? OSBORN_COEFFICIENT,
              ),
            ]
          : []),
      ];

const detectorNoise = (seen: Seen, card: DetectorCard): SeenStep[] => {
  const parts: NoiseParts = noiseParts(card, seen.star.magnitude);
  const { star, sky, exposures, weight } = counts(seen, card);
  const compared = ofCard(
    "k_c",
    "factor of the comparison stars, √(1 + 1/n)",
    "",
    card.comparisonStars === undefined ? 1 : comparisonFactor(card.comparisonStars),
  );
  const part = (
    key: keyof NoiseParts,
    symbol: string,
    label: string,
    formula: string,
    inputs: WorkingInput[],
    reference: string,
  ): SeenStep => ({
    key: `noise_${key}`,
    symbol,
    label,
    unit: "ppm",
    value: parts[key],
    formula,
    inputs,
    reference,
  });
  const onStar = [derived(star), derived(exposures)];
  const steps = [
    part(
      "photon",
      "sigma_ph",
      "photon noise",
      "1e6 / sqrt(n_star) / sqrt(n_exp) * k_c",
      [...onStar, compared],
      HOWELL,
    ),
    part(
      "background",
      "sigma_sky",
      "noise of the sky",
      "1e6 * sqrt(w * n_sky) / n_star / sqrt(n_exp)",
      [...onStar, derived(weight), derived(sky)],
      HOWELL,
    ),
    part(
      "dark",
      "sigma_dark",
      "noise of the dark current",
      "1e6 * sqrt(w * d * t) / n_star / sqrt(n_exp)",
      [
        ...onStar,
        derived(weight),
        ofCard("d", "dark current", "s-1", card.darkRate),
        ofCard("t", "exposure", "s", card.exposureS),
      ],
      HOWELL,
    ),
    part(
      "read",
      "sigma_read",
      "read noise",
      "1e6 * sqrt(w) * n_R / n_star / sqrt(n_exp)",
      [...onStar, derived(weight), ofCard("n_R", "electrons rms of a reading", "", card.readNoise)],
      HOWELL,
    ),
    part(
      "digitisation",
      "sigma_dig",
      "digitisation noise",
      "1e6 * sqrt(w) * G * s_f / n_star / sqrt(n_exp)",
      [
        ...onStar,
        derived(weight),
        ofCard("G", "electrons per count", "", card.gain ?? 1),
        ofCard("s_f", "digitisation error", "counts", card.digitisation ?? 0),
      ],
      HOWELL,
    ),
    part(
      "scintillation",
      "sigma_sc",
      "scintillation",
      `${twinkleFormula(card)} / sqrt(n_exp) * k_c`,
      [...twinkleInputs(card), derived(exposures), compared],
      card.scintillationLaw === "osborn"
        ? "Osborn et al. 2015, MNRAS 452, 1707, eq. 7."
        : "Young 1967, AJ 72, 747; Dravins et al. 1998, PASP 110, 610.",
    ),
    part(
      "jitter",
      "sigma_jit",
      "jitter",
      "j / sqrt(n_exp)",
      [derived(exposures), ofCard("j", "jitter of one exposure", "ppm", card.jitterPpm ?? 0)],
      "The instrument card.",
    ),
  ];
  const total: SeenStep = {
    key: "noise_1h",
    symbol: "sigma",
    label: "noise in one hour",
    unit: "ppm",
    value: seen.assessment.noise1h,
    formula: `sqrt(${[...steps.map((step) => `${step.symbol}^2`), "sigma_red^2", "sigma_floor^2"].join(" + ")})`,
    inputs: [
      ...steps.map(derived),
      ofCard("sigma_red", "red noise", "ppm", card.redNoisePpm ?? 0),
      ofCard("sigma_floor", "floor", "ppm", card.floorPpm),
    ],
    reference: "Independent parts add in quadrature.",
  };
  return [total, ...steps, star, sky, exposures, weight];
};

/** The noise of one hour, then its parts and what they rest on. */
export const noiseSteps = (seen: Seen): SeenStep[] =>
  seen.card.model === "formula" ? formulaNoise(seen, seen.card) : detectorNoise(seen, seen.card);
