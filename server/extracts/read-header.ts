import { findMeaning, meaningOfHeader } from "#shared/catalogue/header-spellings.ts";
import { conversionTo } from "#shared/units/units.ts";

export interface HeaderReading {
  key: string | undefined;
  rank: number;
  /** As the header spells it, if it does. */
  unit: string;
}

const NOTHING: HeaderReading = { key: undefined, rank: Number.MAX_SAFE_INTEGER, unit: "" };

const whole = (header: string): HeaderReading | undefined => {
  const found = meaningOfHeader(header);
  return found && { key: found.key, rank: found.rank, unit: "" };
};

const isUnitOf = (key: string | undefined, unit: string): boolean => {
  const canonical = findMeaning(key ?? "")?.unit;
  return canonical !== undefined && conversionTo(canonical, unit) !== undefined;
};

/** `plx [mas]`, `parallax (mas)`, `RA, deg` and `pmRA / mas yr-1`: a name and its unit. */
const BESIDE: readonly RegExp[] = [/^(.+?)\s*[[(]([^[\]]*)[\])]$/, /^(.+?)\s*[,/]\s+(.+)$/];

/** `plx_mas`, `distance_pc`, `ra_deg`: the last word is a unit that the quantity comes in. */
const withLastWord = (header: string): HeaderReading | undefined => {
  const parts = /^(.+?)[_ ]([A-Za-zµμ"]+)$/.exec(header);
  const found = parts && meaningOfHeader(parts[1] ?? "");
  const unit = (parts?.[2] ?? "").replace(/^(mas|arcsec|uas)(?:per)?yr$/i, "$1/yr");
  if (!found || findMeaning(found.key)?.unit === "" || !isUnitOf(found.key, unit)) return undefined;
  return { key: found.key, rank: found.rank + 1, unit };
};

/** `gaia.ra`, `t1.ra`: the name behind that of its table. */
const behindTable = (header: string): HeaderReading | undefined => {
  const parts = /^[A-Za-z]\w*\.(\w.*)$/.exec(header);
  const found = parts && whole(parts[1] ?? "");
  return found ? { ...found, rank: found.rank + 1 } : undefined;
};

const beside = (header: string): HeaderReading | undefined => {
  for (const form of BESIDE) {
    const parts = form.exec(header);
    const found = parts && meaningOfHeader(parts[1] ?? "");
    if (found) return { key: found.key, rank: found.rank, unit: (parts[2] ?? "").trim() };
  }
  return undefined;
};

/** Names that another quantity has as well: a small g is more often a band of another system. */
const OTHERS_TOO = new Set(["g", "gmag", "mag_g", "gmag_err", "e_gmag", "g_err", "e_g", "b", "l"]);

export const isNameOfOthersToo = (header: string): boolean => OTHERS_TOO.has(header.trim());

/** What a header says of its column. `[Fe/H]` and `log(g)` are names, not units. */
export const readHeader = (header: string): HeaderReading => {
  const text = header.trim();
  const parted = beside(text);
  // `RA [h]` would read as `ra_h` too, which names no unit.
  if (parted && isUnitOf(parted.key, parted.unit)) return parted;
  return whole(text) ?? parted ?? withLastWord(text) ?? behindTable(text) ?? NOTHING;
};
