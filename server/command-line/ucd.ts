import { COLUMNS, type Column } from "#shared/catalogue/columns.ts";

/** Quantities for which catalogues agree on one UCD. */
const SURE = new Set(
  (COLUMNS as readonly Column[])
    .filter((c) => c.stage === "given" && c.kind === "number" && c.group !== "flags" && c.key !== "card_mag")
    .map((c) => c.key)
    .concat("teff"),
);

const ucdOf = new Map((COLUMNS as readonly Column[]).map((c) => [c.key, c.ucd.toLowerCase().split(";")]));

/** UCDs of the first kind (`POS_EQ_RA_MAIN`) say the same in other words, and are not compared. */
const isFirstKind = (ucd: string): boolean => /^[A-Z0-9_/-]+$/.test(ucd) && !ucd.includes(".");

/** Columns spelled [M/H] are taken for [Fe/H], so the word for the abundance of all metals is no other quantity. */
const ALSO: ReadonlyMap<string, string> = new Map([["phys.abund.z", "phys.abund.fe"]]);

/** One word is the other, or a kind of it: `phot.mag;em.opt` speaks of `phot.mag;em.opt.B` too. */
const isAkin = (a: string, b: string): boolean => a === b || a.startsWith(`${b}.`) || b.startsWith(`${a}.`);

const bandsOf = (words: readonly string[]): string[] => words.filter((word) => word.startsWith("em."));

/**
 * Whether a declared UCD speaks of another quantity than the column's name does. An unknown or empty UCD speaks of none.
 *
 * @param means key of a quantity, or of its error
 */
export const contradicts = (ucd: string, means: string): boolean => {
  const key = means.replace(/_err$/, "");
  if (ucd.trim() === "" || isFirstKind(ucd.trim()) || !SURE.has(key)) return false;
  const words = ucd
    .toLowerCase()
    .split(";")
    .map((word) => word.trim())
    .map((word) => ALSO.get(word) ?? word);
  const isError = words.some((word) => word.startsWith("stat.error"));
  if (isError !== means.endsWith("_err")) return true;
  const own = words.filter((word) => !word.startsWith("stat.") && !word.startsWith("meta."));
  const [main = "", ...more] = ucdOf.get(key) ?? [];
  // An error may name no quantity: `stat.error` alone says nothing against it.
  if (own.length === 0) return !isError;
  if (!own.some((word) => isAkin(word, main))) return true;
  const bands = bandsOf(own);
  const band = bandsOf(more)[0];
  return band !== undefined && bands.length > 0 && !bands.some((word) => isAkin(word, band));
};
