import type { ReadingPlan } from "#shared/api/extracts.ts";
import type { PositionFrame } from "../formats/table.ts";
import type { Sample } from "./sample.ts";

export type FramePlan = Pick<ReadingPlan, "frame" | "equinox" | "epoch">;

/** Julian year of an epoch such as `J2016.0`; null where there is none. */
export const julianYear = (epoch: string | null | undefined): number | null => {
  const parts = /^\s*J?\s*(\d{4}(?:\.\d*)?)\s*$/.exec(epoch ?? "");
  return parts ? Number(parts[1]) : null;
};

/** `at Ep=2016.0`, `Epoch J2015.5`: how descriptions of columns tell the date of their positions. */
const EPOCH_IN_WORDS = /\b(?:Ep|epoch)\s*(?:=|of|:)?\s*J?(\d{4}(?:\.\d+)?)\b/i;

/** How a plan card points to its column. */
interface Card {
  readonly index: number;
  readonly means: string;
}

const frameOf = (sample: Sample, index: number): PositionFrame | null =>
  sample.columns[index]?.column.frame ?? sample.meta.frame;

const isOldSystem = (system: string): boolean => /FK4|B1950|B1900|B1875/i.test(system);

/** A frame that the file names and that is not converted here; null for any other. */
export const unreadFrame = (sample: Sample, card: Card): string | null => {
  const said = frameOf(sample, card.index);
  const name = sample.header[card.index] ?? "";
  const system = said?.system ?? "";
  if (isOldSystem(system) || /^\s*B/i.test(said?.equinox ?? "")) return `${system || "FK4"}`;
  if (/B1950|B1900|B1875|(?:RA|DEC?)_?1950/i.test(name)) return "FK4 with the equinox in its name";
  return /ecl/i.test(system) ? system : null;
};

const isGalactic = (sample: Sample, index: number): boolean => {
  const column = sample.columns[index]?.column;
  return column !== undefined && (/^glon$/i.test(column.name) || /^pos\.galactic\.lon/i.test(column.ucd));
};

/** Frame, equinox and epoch as far as the file itself says them; an epoch is never supposed. */
export const suggestFrame = (sample: Sample, cards: readonly Card[]): FramePlan => {
  const ra = cards.find((c) => c.means === "ra");
  if (!ra) return { frame: "ICRS", equinox: null, epoch: null };
  const said = frameOf(sample, ra.index);
  const system = said?.system ?? "";
  const words = EPOCH_IN_WORDS.exec(sample.columns[ra.index]?.column.description ?? "");
  const epoch = julianYear(said?.epoch) ?? (words ? Number(words[1]) : null);
  if (isGalactic(sample, ra.index) || /galactic/i.test(system))
    return { frame: "galactic", equinox: null, epoch };
  if (/FK5/i.test(system)) return { frame: "FK5", equinox: julianYear(said?.equinox) ?? 2000, epoch };
  if (system === "" || /ICRS|ICRF|GCRS/i.test(system)) return { frame: "ICRS", equinox: null, epoch };
  return { frame: null, equinox: null, epoch };
};
