import { PASSBAND_COLUMNS } from "#shared/api/instruments.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import { PHOTON_BANDS } from "#shared/science/passbands.ts";

export type Model = "formula" | "detector";

export interface NumberField {
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly hint?: string;
  /** Blank may mean that it does not apply (`null`) or that the card does not say it (`absent`). */
  readonly blank?: "null" | "absent";
}

/** A word out of a few; the blank one leaves it to what is usual. */
export interface ChoiceField {
  readonly key: string;
  readonly label: string;
  readonly hint?: string;
  readonly choices: readonly { value: string; label: string }[];
}

interface Group {
  readonly title: string;
  readonly fields: readonly (NumberField | ChoiceField)[];
}

export const isChoice = (field: NumberField | ChoiceField): field is ChoiceField => "choices" in field;

const field = (
  key: string,
  label: string,
  unit = "",
  more: Pick<NumberField, "hint" | "blank"> = {},
): NumberField => ({ key, label, unit, ...more });

/** A figure that a card need not state; the hint says what holds then. */
const optional = (key: string, label: string, unit: string, hint: string): NumberField =>
  field(key, label, unit, { hint, blank: "absent" });

const LIMITS_OF_USE: Group = {
  title: "Limits",
  fields: [
    field("brightLimit", "Bright limit", "mag", { hint: "Brighter stars count as saturated." }),
    field("faintLimit", "Faint limit", "mag", { hint: "Fainter stars are not measured." }),
  ],
};

/** The fields of a card by its model, in the order in which light passes through. */
export const GROUPS: Readonly<Record<Model, readonly Group[]>> = {
  formula: [
    {
      title: "Noise in one hour",
      fields: [
        field("referenceMagnitude", "Reference magnitude", "mag"),
        field("photonPpm", "Photons", "ppm", { hint: "Grows as 10^(0.2 Δm)." }),
        field("backgroundPpm", "Background", "ppm", { hint: "Grows as 10^(0.4 Δm)." }),
        field("floorPpm", "Floor", "ppm", { hint: "The same for every star." }),
      ],
    },
    LIMITS_OF_USE,
  ],
  detector: [
    {
      title: "Light",
      fields: [
        field("apertureM", "Aperture", "m"),
        field("obstruction", "Obstruction", "", { hint: "Ratio of the diameters, 0 to 0.9." }),
        field("throughput", "Throughput", "", { hint: "Optics × filter × detector, up to 1." }),
      ],
    },
    {
      title: "Detector",
      fields: [
        field("pixelScale", "Pixel scale", "″/px"),
        field("fwhmPx", "Image size, FWHM", "px"),
        field("apertureRadiusPx", "Aperture radius", "px"),
        field("skyPixels", "Sky annulus", "px²"),
        field("readNoise", "Read noise", "e⁻"),
        field("darkRate", "Dark", "e⁻/s"),
        field("fullWell", "Full well", "e⁻"),
        field("exposureS", "Exposure", "s"),
        field("overheadS", "Time between", "s"),
      ],
    },
    {
      title: "Converter",
      fields: [
        optional("gain", "Gain", "e⁻/ct", "Above 0 to 10 000; blank counts as 1."),
        optional(
          "mostCounts",
          "Most counts",
          "ct",
          "The largest number it writes, 65 535 for 16 bit. With the gain a second limit beside the full well; blank: the full well alone.",
        ),
        optional("digitisation", "Digitisation", "ct", "0 to 1000; 0.289 is that of rounding. Blank: none."),
      ],
    },
    {
      title: "Sky and site",
      fields: [
        {
          key: "magnitudeSystem",
          label: "Magnitudes",
          choices: [
            { value: "", label: "not stated: Vega" },
            { value: "vega", label: "Vega" },
            { value: "ab", label: "AB" },
          ],
          hint: "System of the star's and of the sky's magnitudes.",
        },
        field("skyBrightness", "Sky, dark time", "mag/″²"),
        field("extinction", "Extinction", "mag", { hint: "Per airmass; 0 in space." }),
        field("airmass", "Airmass", ""),
        field("siteAltitudeM", "Altitude", "m", {
          blank: "null",
          hint: "Blank in space, where nothing scintillates.",
        }),
        {
          key: "scintillationLaw",
          label: "Scintillation",
          choices: [
            { value: "", label: "not stated: Young" },
            { value: "young", label: "Young 1967" },
            { value: "osborn", label: "Osborn 2015" },
          ],
          hint: "At the zenith Osborn's law gives about 1.6 times what Young's does.",
        },
        optional(
          "scintillationCoefficient",
          "Site coefficient",
          "",
          "Of Osborn's law alone, above 0 to 100; medians of sites lie between 1.30 and 1.67. Blank counts as 1.5.",
        ),
      ],
    },
    {
      title: "Light curve",
      fields: [
        optional(
          "comparisonStars",
          "Comparison stars",
          "",
          "Equal to the target, 1 or more. They add their own photon noise and scintillation; blank: none is added.",
        ),
        optional(
          "jitterPpm",
          "Pointing jitter",
          "ppm",
          "In one exposure; averages down as photon noise does. Blank: none.",
        ),
        optional(
          "redNoisePpm",
          "Red noise",
          "ppm",
          "Shared by the points of one transit: averages down over transits, not within one. Blank: none.",
        ),
        field("floorPpm", "Floor", "ppm", { hint: "What is left however long one observes within an hour." }),
      ],
    },
    LIMITS_OF_USE,
  ],
};

const allOf = (model: Model) => GROUPS[model].flatMap(({ fields }) => fields);

export const fieldsOf = (model: Model): readonly NumberField[] =>
  allOf(model).flatMap((f) => (isChoice(f) ? [] : [f]));

export const choicesOf = (model: Model): readonly ChoiceField[] =>
  allOf(model).flatMap((f) => (isChoice(f) ? [f] : []));

export const MODEL_LABELS: Readonly<Record<Model, string>> = {
  formula: "A noise curve in three terms",
  detector: "Telescope and detector",
};

export const PASSBAND_CHOICES: readonly { value: string; label: string }[] = PASSBAND_COLUMNS.map((key) => ({
  value: key,
  label: findColumn(key)?.label ?? key,
}));

export const PHOTON_BAND_CHOICES: readonly { value: string; label: string }[] = Object.entries(
  PHOTON_BANDS,
).map(([value, { label }]) => ({ value, label }));
