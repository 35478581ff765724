import { readUnit } from "./read-unit.ts";

/**
 * Spellings of units, and the way from each to the canonical unit of a column. A spelling that does not stand here
 * is not guessed at: whoever confirms the reading plan names the unit.
 */

/** canonical = value × factor + offset */
export interface Conversion {
  readonly factor: number;
  readonly offset: number;
}

const DAYS_PER_YEAR = 365.25;
/** Julian date of the epoch J2000.0. */
const J2000 = 2_451_545;
/** Julian date of the modified date 0. */
const MJD_ZERO = 2_400_000.5;

type Reader = (spelling: string) => Conversion | undefined;

const plain = (spelling: string): string =>
  spelling
    .trim()
    .replace(/^[[("](.+)[\])"]$/, "$1")
    .toLowerCase()
    .replace(/[\s:_]+/g, "");

const factor = (value: number, offset = 0): Conversion => ({ factor: value, offset });

/** Units of one dimension, in multiples of a size. */
const multiples =
  (dimension: string, size: number): Reader =>
  (spelling) => {
    const unit = readUnit(spelling);
    return unit && !unit.isLog && unit.dimension === dimension ? factor(unit.size / size) : undefined;
  };

const MAS_PER_DEGREE = 3_600_000;
const angle = multiples("angle", MAS_PER_DEGREE);
const HOURS = new Set(["h", "hr", "hrs", "hour", "hours", "hourangle", "hms", "hhmmss", "hmsdms"]);
const DEGREES = new Set(["dms", "ddmmss", "degarcminarcsec"]);

/** Hours of right ascension are an angle; so are degrees, minutes and seconds. */
const position: Reader = (spelling) => {
  const word = plain(spelling);
  if (HOURS.has(word)) return factor(15);
  return DEGREES.has(word) ? factor(1) : angle(spelling);
};

const NO_LOG_SAID = new Set(["cgs", "dex", "cm/s2", "cm.s-2", "cms-2", "cm/s**2", "cm/s^2"]);

/** Acceleration as a logarithm. Nobody tabulates it otherwise, so that the plain unit means its logarithm too. */
const gravity: Reader = (spelling) => {
  if (NO_LOG_SAID.has(plain(spelling))) return factor(1);
  const unit = readUnit(spelling);
  const cgs = readUnit("cm.s-2");
  if (!unit?.isLog || !cgs || unit.dimension !== cgs.dimension) return undefined;
  return factor(1, Number(Math.log10(unit.size / cgs.size).toFixed(9)));
};

const abundance: Reader = (spelling) => {
  const word = plain(spelling);
  if (["log", "log10", "solar", "sun", "dex"].includes(word)) return factor(1);
  const unit = readUnit(spelling);
  return unit && unit.size === 1 && (unit.dimension === "" || unit.dimension === "decade")
    ? factor(1)
    : undefined;
};

const DATES: Readonly<Record<string, Conversion>> = {
  jd: factor(1 / DAYS_PER_YEAR, 2000 - J2000 / DAYS_PER_YEAR),
  mjd: factor(1 / DAYS_PER_YEAR, 2000 + (MJD_ZERO - J2000) / DAYS_PER_YEAR),
};
const DATE_WORDS: Readonly<Record<string, keyof typeof DATES>> = {
  juliandate: "jd",
  julianday: "jd",
  "d(jd)": "jd",
  "d(mjd)": "mjd",
  modifiedjulianday: "mjd",
  modifiedjuliandate: "mjd",
};

/** Dates: Julian years, or days counted from where it says. Days alone name no beginning. */
const date: Reader = (spelling) => {
  const word = plain(spelling);
  const found = DATES[DATE_WORDS[word] ?? word];
  if (found) return found;
  const unit = ["jyear", "j.yr"].includes(word) ? factor(1) : multiples("time", 1)(spelling);
  return unit?.factor === 1 ? unit : undefined;
};

const isAb = (spelling: string): boolean => /^(?:mag\(ab\)|abmag|mag_?ab|ab)$/.test(plain(spelling));
const isVega = (spelling: string): boolean =>
  /^(?:mag\(vega\)|vegamag|mag_?vega|vega)$/.test(plain(spelling));

/** Zero point that a unit of magnitudes names; null where it names none. */
export const systemInUnit = (spelling: string): "vega" | "ab" | null => {
  if (isAb(spelling)) return "ab";
  return isVega(spelling) ? "vega" : null;
};

const magnitudes = multiples("magnitude", 1);
const motions = multiples("angle time-1", 1);

/** Canonical units of the column registry, and how spellings lead to them. */
const CANONICAL: Readonly<Record<string, Reader>> = {
  deg: position,
  mas: multiples("angle", 1),
  "mas.yr-1": motions,
  pc: multiples("length", 1),
  K: multiples("temperature", 1),
  // What is said to be of the AB system is no magnitude of the catalogue's until it is converted.
  mag: (spelling) => (isAb(spelling) ? undefined : isVega(spelling) ? factor(1) : magnitudes(spelling)),
  "dex(cm.s-2)": gravity,
  dex: abundance,
  yr: date,
  "": multiples("", 1),
};

/**
 * The way from a spelled unit to a canonical one of the column registry; undefined when the spelling is unknown or
 * measures something else. An empty spelling means the canonical unit only where that is a pure number.
 */
export const conversionTo = (canonical: string, spelling: string): Conversion | undefined => {
  if (spelling === canonical) return Object.hasOwn(CANONICAL, canonical) ? factor(1) : undefined;
  return Object.hasOwn(CANONICAL, canonical) ? CANONICAL[canonical]?.(spelling) : undefined;
};

const CHOICES: Readonly<Record<string, readonly string[]>> = {
  deg: ["deg", "hourangle", "rad", "arcmin", "arcsec"],
  mas: ["mas", "arcsec", "uas"],
  "mas.yr-1": ["mas.yr-1", "arcsec.yr-1", "uas.yr-1", "deg.yr-1"],
  pc: ["pc", "kpc"],
  K: ["K", "kK"],
  mag: ["mag", "mmag"],
  "dex(cm.s-2)": ["dex(cm.s-2)", "dex(m.s-2)"],
  dex: ["dex"],
  yr: ["yr", "JD", "MJD"],
  "": ["", "%"],
};

/** What a form offers for a column of that canonical unit, the canonical one first. */
export const unitChoices = (canonical: string): readonly string[] => CHOICES[canonical] ?? [canonical];
