import { conversionTo } from "#shared/units/units.ts";

const CANONICAL = ["deg", "mas", "mas.yr-1", "pc", "K", "mag", "dex(cm.s-2)", "dex", "yr", ""];

/** Units of columns that the catalogue does not keep, in the spellings of the trade. */
const OTHERS =
  /^(?:d|days?|hours?|min|s|sec|[km]?m\/s|km\.?s-1|km s-1|m?Jy|[unµμ]m|angstroms?|AA|sol(?:Rad|Mass|Lum)|[RML]_?sun|R_?earth|M_?earth|earthRad|earthMass|jupiter(?:Rad|Mass)|au|g\/cm3|g\.cm-3|g cm-3|ppm|ct|count|electron|pix|[unm]?as|erg.*|W.*|dimensionless|unitless|text|string)$/i;

const isUnit = (text: string): boolean =>
  OTHERS.test(text) ||
  /^[[(][^\])]*[\])]$/.test(text) ||
  CANONICAL.some((unit) => conversionTo(unit, text) !== undefined);

const isNone = (text: string): boolean => /^-*$/.test(text);

/** Whether a line below the names gives their units: known ones alone, and at least one that is no dash. */
export const isUnitsLine = (cells: readonly string[]): boolean => {
  const said = cells.map((cell) => cell.trim()).filter((cell) => !isNone(cell));
  return said.length > 0 && said.every((cell) => isUnit(cell) && !/^[+-]?[\d.]+$/.test(cell));
};

/** A unit as such a line has it: without the brackets of the line's own, and nothing for a dash. */
export const unitIn = (cell: string): string => {
  const text = cell.trim();
  return isNone(text) ? "" : text.replace(/^\((.*)\)$/, "$1");
};
