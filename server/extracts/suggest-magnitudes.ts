import { findMeaning } from "#shared/catalogue/header-spellings.ts";
import { systemInUnit } from "#shared/units/units.ts";
import type { TableColumn } from "../formats/table.ts";

export type MagnitudeSystem = "vega" | "ab";

/**
 * Names that belong to one survey or definition, whose zero point is known: those of the catalogue itself, the optical bands
 * of the large astrometric survey and its mirrors, the near-infrared survey's own names, and Johnson's V.
 */
const VEGA_NAMES =
  /^(?:(?:g|bp|rp|v|j|h|ks|card)_mag|phot_(?:g|bp|rp)_mean_mag|G(?:mag)?|(?:G_?)?(?:BP|RP)(?:mag)?|gaia.*|[jhk]s?_(?:m|cmsig|msigcom)|.*(?:2mass|tmass|twomass).*|V(?:mag)?|vmag|v|[vV]_?johnson|johnson_?v|.*[tT]mag)$/i;

/** A small g is a band of another system than a capital one. */
const isSmallG = (name: string): boolean => /^g(?:mag)?$/.test(name);

export const isMagnitude = (means: string): boolean =>
  means.endsWith("_mag") && findMeaning(means)?.unit === "mag";

const WORDS: readonly (readonly [RegExp, MagnitudeSystem])[] = [
  [/\bAB\b|\bAB_?mag/, "ab"],
  [/\bvega\b|\bvegamag/i, "vega"],
];

const said = (text: string): MagnitudeSystem | null => WORDS.find(([word]) => word.test(text))?.[1] ?? null;

/**
 * Zero point of a column of magnitudes as its unit, description or name tells it; null where they leave it open.
 *
 * @param unit as the file spells it, in a field of its own or in the header
 */
export const magnitudeSystemOf = (
  { name, description }: Pick<TableColumn, "name" | "description">,
  unit: string,
): MagnitudeSystem | null => {
  const plain = name.replace(/\s*[[(].*$/, "").trim();
  const system = systemInUnit(unit) ?? said(description) ?? said(name.replaceAll("_", " "));
  if (system !== null) return system;
  return VEGA_NAMES.test(plain) && !isSmallG(plain) ? "vega" : null;
};
