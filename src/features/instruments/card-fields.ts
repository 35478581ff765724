import { PASSBAND_COLUMNS } from "#shared/api/instruments.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import { PHOTON_BANDS } from "#shared/science/passbands.ts";

export type Model = "formula" | "detector";

export interface NumberField {
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly hint?: string;
  /** Blank means that it does not apply. */
  readonly mayBeBlank?: true;
}

interface Group {
  readonly title: string;
  readonly fields: readonly NumberField[];
}

const field = (
  key: string,
  label: string,
  unit = "",
  more: Pick<NumberField, "hint" | "mayBeBlank"> = {},
): NumberField => ({ key, label, unit, ...more });

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
      title: "Sky and site",
      fields: [
        field("skyBrightness", "Sky, dark time", "mag/″²"),
        field("extinction", "Extinction", "mag", { hint: "Per airmass; 0 in space." }),
        field("airmass", "Airmass", ""),
        field("siteAltitudeM", "Altitude", "m", {
          mayBeBlank: true,
          hint: "Blank in space, where nothing scintillates.",
        }),
        field("floorPpm", "Floor, red noise", "ppm"),
      ],
    },
    LIMITS_OF_USE,
  ],
};

export const fieldsOf = (model: Model): readonly NumberField[] => GROUPS[model].flatMap((g) => g.fields);

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
