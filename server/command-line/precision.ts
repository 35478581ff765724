import { blankCode, blankReason } from "#shared/catalogue/blank-reasons.ts";
import type { DetectorCard } from "#shared/science/cards.ts";
import { PHOTON_BANDS } from "#shared/science/passbands.ts";
import { csvLine } from "../handover/csv.ts";
import { needed, oneOf, readOptions } from "./options.ts";
import {
  detectorPrecision,
  PHOTONS_ALONE,
  type Precision,
  type PrecisionOf,
  photonPrecision,
} from "./precision-grid.ts";
import { readDiameters, readMagnitude, readTimes, timeText } from "./quantities.ts";
import { type Named, readCard } from "./settings-files.ts";
import { type Surroundings, write } from "./surroundings.ts";
import { usage } from "./trouble.ts";

export const PRECISION_HELP = `Prints how precisely a star can be measured, in ppm, by diameter of the aperture and time.

  shortlight precision --diameters 0.1,0.5,2 --exposures 60,600,1h,6.5h --magnitude 10
                       [--card CARD] [--photons-only] [--format text|csv]

  --diameters     of the aperture, m
  --exposures     times over which is integrated, s; min, h or d may follow the number
  --magnitude     of the star: in V, or in the passband of the card
  --card          an instrument card with a detector: a JSON file, or the name of one that comes along (heron-04).
                  Everything that it counts is added up, with its aperture exchanged for each of the diameters.
  --photons-only  the photons of the star alone; this is also what is printed without a card
  --format        text (a table under the assumptions; the default) or csv (one line for each cell: diameter_m,
                  exposure_s, precision_ppm, and precision_ppm_blank, the reason where there is none)

Without a card: V with the photon rate of Bessell, Castelli & Plez 1998, a band ${PHOTONS_ALONE.widthAngstrom} Å wide, no obstruction, half of
the photons counted, no air, no sky, no detector.
`;

const OPTIONS = {
  diameters: { type: "string" },
  exposures: { type: "string" },
  magnitude: { type: "string" },
  card: { type: "string" },
  "photons-only": { type: "boolean", default: false },
  format: { type: "string", default: "text" },
} as const;

interface Model {
  readonly of: PrecisionOf;
  readonly assumptions: readonly string[];
}

const withoutCard = (magnitude: number): Model => ({
  of: photonPrecision(magnitude),
  assumptions: [
    `Photon noise alone, ppm, of a star of V = ${magnitude} (Vega).`,
    `V by Bessell, Castelli & Plez 1998; band ${PHOTONS_ALONE.widthAngstrom} Å wide; no obstruction; throughput ${PHOTONS_ALONE.throughput};`,
    "no extinction, sky, read or scintillation noise.",
  ],
});

const withCard = (
  { name, settings }: Named<DetectorCard>,
  magnitude: number,
  isPhotonsOnly: boolean,
): Model => {
  const { exposureS, overheadS, photonBand, magnitudeSystem } = settings;
  const system = magnitudeSystem === "ab" ? "AB" : "Vega";
  const what = isPhotonsOnly ? "Photon noise alone" : "Noise";
  return {
    of: detectorPrecision(settings, magnitude, isPhotonsOnly),
    assumptions: [
      `${what}, ppm, of a star of ${PHOTON_BANDS[photonBand].label} = ${magnitude} (${system}) by the card “${name}”.`,
      `Its aperture is exchanged; scale, image size in pixels and all else stay. Exposures of ${exposureS} s with ${overheadS} s`,
      "between them fill the time; a shorter time is one exposure. Red noise never averages down, the floor from an hour on.",
    ],
  };
};

const isDetector = (card: Named<{ model: string }>): card is Named<DetectorCard> =>
  card.settings.model === "detector";

const modelOf = async (
  folder: string,
  card: string | undefined,
  magnitude: number,
  isPhotonsOnly: boolean,
): Promise<Model> => {
  if (card === undefined) return withoutCard(magnitude);
  const read = await readCard(folder, card);
  if (isDetector(read)) return withCard(read, magnitude, isPhotonsOnly);
  throw usage(
    `The card “${read.name}” gives its noise as a formula, without a telescope whose aperture could be exchanged.`,
    "Name a card with a detector, or none for the photons alone.",
  );
};

const cellText = ({ ppm, blank }: Precision): string =>
  blank === null ? ppm.toFixed(2) : blankReason(blankCode(blank)).word;

const padded = (rows: readonly (readonly string[])[]): string => {
  const widths = (rows[0] ?? []).map((_, i) => Math.max(...rows.map((row) => (row[i] ?? "").length)));
  return rows.map((row) => `${row.map((cell, i) => cell.padStart(widths[i] ?? 0)).join("  ")}\n`).join("");
};

const textTable = ({ of, assumptions }: Model, diameters: number[], times: number[]): string =>
  `${assumptions.join("\n")}\n\n${padded([
    ["D", ...times.map(timeText)],
    ...diameters.map((d) => [`${d} m`, ...times.map((t) => cellText(of(d, t)))]),
  ])}`;

const csvTable = ({ of }: Model, diameters: number[], times: number[]): string => {
  const lines = diameters.flatMap((d) =>
    times.map((t) => {
      const { ppm, blank } = of(d, t);
      return csvLine([d, t, blank === null ? ppm : null, blank]);
    }),
  );
  return csvLine(["diameter_m", "exposure_s", "precision_ppm", "precision_ppm_blank"]) + lines.join("");
};

export const precision = async (args: readonly string[], at: Surroundings): Promise<void> => {
  const { values, positionals } = readOptions(args, OPTIONS, "precision");
  if (positionals.length > 0)
    throw usage(`“${positionals[0]}” stands alone.`, "`shortlight precision --help` lists the options.");
  const format = oneOf(values.format, ["text", "csv"], "format");
  const diameters = readDiameters(needed(values.diameters, "diameters", "precision"));
  const times = readTimes(needed(values.exposures, "exposures", "precision"));
  const magnitude = readMagnitude(needed(values.magnitude, "magnitude", "precision"));
  const model = await modelOf(at.folder, values.card, magnitude, values["photons-only"]);
  await write(at.out, (format === "text" ? textTable : csvTable)(model, diameters, times));
};
