/**
 * Spellings of units, and the way from each to the canonical unit of a column. A spelling that does not stand here
 * is not guessed at: whoever confirms the reading plan names the unit.
 */

/** canonical = value × factor + offset */
export interface Conversion {
  readonly factor: number;
  readonly offset: number;
}

interface Unit {
  /** Units of one dimension convert into each other. */
  readonly dimension: string;
  /** Size in the dimension's base: mas, mas/yr, K, mag, dex of cgs, Julian years. */
  readonly factor: number;
  readonly offset: number;
  readonly spellings: readonly string[];
}

const unit = (dimension: string, factor: number, spellings: string, offset = 0): Unit => ({
  dimension,
  factor,
  offset,
  spellings: spellings.split(" "),
});

/** Milliarcseconds in a degree: the base of angles, so that arcseconds and degrees come out without a rounding. */
const DEGREE = 3_600_000;
const DAYS_PER_YEAR = 365.25;
/** Julian date of the epoch J2000.0. */
const J2000 = 2_451_545;
/** Julian date of the modified date 0. */
const MJD_ZERO = 2_400_000.5;

const UNITS: readonly Unit[] = [
  unit("angle", DEGREE, "deg degree degrees degs °"),
  unit("angle", 15 * DEGREE, "hourangle h hr hour hours hms"),
  unit("angle", (180 / Math.PI) * DEGREE, "rad radian radians"),
  unit("angle", 60_000, "arcmin arcminute arcminutes amin ' arcm"),
  unit("angle", 1000, 'arcsec arcsecond arcseconds asec " as arcs'),
  unit("angle", 1, "mas milliarcsec milliarcsecond milliarcseconds marcsec"),
  unit("angle", 0.001, "uas microarcsec microarcsecond microarcseconds uarcsec"),
  unit("motion", 1, "mas.yr-1 mas.yr^-1 mas.a-1 mas/yr mas/year mas/a mas.year-1 milliarcsec/yr masyr-1"),
  unit("motion", 1000, 'arcsec.yr-1 arcsec/yr arcsec/year arcsec.a-1 arcsec/a as/yr "/yr asec/yr'),
  unit("motion", 0.001, "uas.yr-1 uas/yr microarcsec/yr uas.a-1 uas/year"),
  unit("motion", 3_600_000, "deg.yr-1 deg/yr deg/year deg.a-1"),
  unit("motion", 10, "arcsec/cy arcsec/century arcsec.cy-1 as/cy"),
  unit("distance", 1, "pc parsec parsecs"),
  unit("distance", 1000, "kpc kiloparsec kiloparsecs"),
  unit("temperature", 1, "k kelvin kelvins degk"),
  unit("temperature", 1000, "kk 1000k 10+3k"),
  unit("magnitude", 1, "mag mags magnitude magnitudes mag(vega) vegamag"),
  unit("magnitude", 0.001, "mmag millimag"),
  unit(
    "gravity",
    1,
    "dex(cm.s-2) dex(cm/s2) log(cm.s-2) log(cm/s2) log(cgs) log.cm.s-2 cgs dex dex(cgs) cm.s-2 cm/s2 log10(cm.s-2) log(cm.s**-2)",
  ),
  unit("gravity", 1, "dex(m.s-2) dex(m/s2) log(m.s-2) log(m/s2) log(si) dex(si)", 2),
  unit("abundance", 1, "dex dex(solar) log log(sun) sun solar -"),
  unit("date", 1, "yr year years a julianyear jyear jyr j.yr"),
  unit("date", 1 / DAYS_PER_YEAR, "jd juliandate julianday d(jd)", 2000 - J2000 / DAYS_PER_YEAR),
  unit("date", 1 / DAYS_PER_YEAR, "mjd", 2000 + (MJD_ZERO - J2000) / DAYS_PER_YEAR),
  unit("number", 1, "- 1 none unitless dimensionless --- number"),
  unit("number", 0.01, "% percent"),
];

/** Canonical units of the column registry, and the spelling that forms offer first. */
const CANONICAL: Readonly<Record<string, { dimension: string; size: number }>> = {
  deg: { dimension: "angle", size: DEGREE },
  mas: { dimension: "angle", size: 1 },
  "mas.yr-1": { dimension: "motion", size: 1 },
  pc: { dimension: "distance", size: 1 },
  K: { dimension: "temperature", size: 1 },
  mag: { dimension: "magnitude", size: 1 },
  "dex(cm.s-2)": { dimension: "gravity", size: 1 },
  dex: { dimension: "abundance", size: 1 },
  yr: { dimension: "date", size: 1 },
  "": { dimension: "number", size: 1 },
};

/** Brackets, spaces and the several ways of writing µ, powers and products made one. */
const plain = (spelling: string): string =>
  spelling
    .trim()
    .replace(/^\[(.*)\]$/, "$1")
    .toLowerCase()
    .replace(/[µμ]/g, "u")
    .replace(/\s*\/\s*/g, "/")
    .replace(/\*\*|\^/g, "")
    .replace(/[\s·*]+/g, ".")
    .replace(/\u2212/g, "-");

const bySpelling = new Map<string, Unit>(
  UNITS.flatMap((u) => u.spellings.map((s) => [`${u.dimension}|${plain(s)}`, u] as const)),
);

/**
 * The way from a spelled unit to a canonical one of the column registry; undefined when the spelling is unknown or
 * measures something else. An empty spelling means the canonical unit only where that is a pure number.
 */
export const conversionTo = (canonical: string, spelling: string): Conversion | undefined => {
  const target = CANONICAL[canonical];
  if (!target) return undefined;
  if (spelling === canonical) return { factor: 1, offset: 0 };
  const found = bySpelling.get(`${target.dimension}|${plain(spelling)}`);
  return found && { factor: found.factor / target.size, offset: found.offset / target.size };
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
