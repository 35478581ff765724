import { COLUMNS, type Column, errorKey } from "#shared/catalogue/columns.ts";

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

/** UCDs of the first kind for what the catalogue keeps. */
const FIRST_KIND: Readonly<Record<string, string>> = {
  POS_EQ_RA_MAIN: "ra",
  POS_EQ_RA: "ra",
  POS_EQ_DEC_MAIN: "dec",
  POS_EQ_DEC: "dec",
  POS_EQ_PMRA: "pmra",
  POS_EQ_PMDEC: "pmdec",
  POS_PARLX_TRIG: "parallax",
  TIME_EPOCH: "epoch",
  PHYS_TEMP_EFFEC: "teff",
  PHYS_GRAVITY_SURFACE: "logg",
  PHOT_JHN_V: "v_mag",
};

/** Quantities that their UCD alone tells from every other of a catalogue. Optical bands are wider than their words. */
const TOLD_APART = [
  "ra",
  "dec",
  "epoch",
  "pmra",
  "pmdec",
  "parallax",
  "j_mag",
  "h_mag",
  "ks_mag",
  "logg",
  "feh",
  "ebv",
  "teff",
];

const wordsOf = (ucd: string): string[] =>
  ucd
    .toLowerCase()
    .split(";")
    .map((word) => word.trim())
    .filter((word) => word !== "" && word !== "meta.main" && word !== "stat.mean");

const sameWords = (a: readonly string[], b: readonly string[]): boolean =>
  a.length === b.length && a.every((word) => b.includes(word));

/** Key of the quantity, or of the error, that a UCD names and no other column of a catalogue would have; else undefined. */
export const meaningOfUcd = (ucd: string): string | undefined => {
  const text = ucd.trim();
  if (isFirstKind(text)) return Object.hasOwn(FIRST_KIND, text) ? FIRST_KIND[text] : undefined;
  const words = wordsOf(text);
  const isError = words.includes("stat.error");
  const own = words.filter((word) => word !== "stat.error");
  const key = TOLD_APART.find((each) =>
    sameWords(
      own,
      (ucdOf.get(each) ?? []).filter((word) => word !== "meta.main"),
    ),
  );
  return key === undefined || !isError ? key : errorKey(key);
};
