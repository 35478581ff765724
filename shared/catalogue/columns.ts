/**
 * THE column registry. A quantity that people see, cut, sort, map, rank or export stands here once; the star
 * table, the scan index, the screens, the readers and the writers all follow it.
 *
 * `unit` is the canonical unit in VOUnit spelling; values are stored, computed and exported in it.
 */

/** Where a value comes from: the extracts, the star's own physics, or the star as one instrument sees it. */
export type ColumnStage = "given" | "stellar" | "instrument";

export type ColumnGroup =
  | "identity"
  | "position"
  | "brightness"
  | "star"
  | "zone"
  | "detectability"
  | "flags";

export interface Column {
  /** Name in files, formulas, URLs and SQL. */
  readonly key: string;
  /** Words for heads and menus. */
  readonly label: string;
  /** Unit in VOUnit spelling; empty for pure numbers and text. */
  readonly unit: string;
  /** Unit as a person reads it under the column head; "–" for pure numbers. */
  readonly unitLabel: string;
  readonly ucd: string;
  readonly description: string;
  readonly kind: "text" | "number" | "integer";
  readonly stage: ColumnStage;
  readonly group: ColumnGroup;
  /** Whether a one-sigma error travels beside it under `<key>_err`. */
  readonly hasError: boolean;
  /** Decimals on screen where no error sets the digits. */
  readonly decimals: number;
  /** Factor from the stored value to the shown one (probabilities are stored as fractions, shown in percent). */
  readonly shownFactor?: number;
  /** Whether histograms of it use a logarithmic axis. */
  readonly logAxis?: boolean;
}

const column = (
  stage: ColumnStage,
  group: ColumnGroup,
  key: string,
  label: string,
  [unit, unitLabel]: readonly [string, string],
  ucd: string,
  decimals: number,
  description: string,
  more: Partial<Pick<Column, "kind" | "hasError" | "shownFactor" | "logAxis">> = {},
): Column => ({
  key,
  label,
  unit,
  unitLabel,
  ucd,
  description,
  kind: "number",
  stage,
  group,
  hasError: false,
  decimals,
  ...more,
});

const NONE = ["", "–"] as const;
const DEG = ["deg", "deg"] as const;
const MAG = ["mag", "mag (Vega)"] as const;
const MAS_YR = ["mas.yr-1", "mas/yr"] as const;
const AU = ["AU", "au"] as const;
const DAY = ["d", "d"] as const;
const withError = { hasError: true } as const;

export const COLUMNS = [
  column(
    "given",
    "identity",
    "designation",
    "Star",
    NONE,
    "meta.id;meta.main",
    0,
    "Name of the star as the preferred extract spells it",
    { kind: "text" },
  ),
  column(
    "given",
    "identity",
    "source_id",
    "Identifier",
    NONE,
    "meta.id",
    0,
    "Identifier in the release it comes from, kept as text to the last digit",
    { kind: "text" },
  ),
  column(
    "given",
    "identity",
    "release",
    "Release",
    NONE,
    "meta.version",
    0,
    "Catalogue release the identifier belongs to",
    { kind: "text" },
  ),

  column(
    "given",
    "position",
    "ra",
    "RA",
    DEG,
    "pos.eq.ra;meta.main",
    5,
    "Right ascension (ICRS) at the epoch given",
  ),
  column(
    "given",
    "position",
    "dec",
    "Dec",
    DEG,
    "pos.eq.dec;meta.main",
    5,
    "Declination (ICRS) at the epoch given",
  ),
  column(
    "given",
    "position",
    "epoch",
    "Epoch",
    ["yr", "yr"],
    "time.epoch",
    2,
    "Julian year for which the position is true",
  ),
  column(
    "given",
    "position",
    "pmra",
    "Motion in RA",
    MAS_YR,
    "pos.pm;pos.eq.ra",
    2,
    "Proper motion in right ascension, multiplied by the cosine of the declination",
    withError,
  ),
  column(
    "given",
    "position",
    "pmdec",
    "Motion in Dec",
    MAS_YR,
    "pos.pm;pos.eq.dec",
    2,
    "Proper motion in declination",
    withError,
  ),
  column(
    "given",
    "position",
    "parallax",
    "Parallax",
    ["mas", "mas"],
    "pos.parallax.trig",
    3,
    "Parallax as measured; zero and negative values are measurements",
    withError,
  ),

  column(
    "given",
    "brightness",
    "g_mag",
    "G",
    MAG,
    "phot.mag;em.opt",
    3,
    "Mean magnitude in a broad optical band (G)",
    withError,
  ),
  column(
    "given",
    "brightness",
    "bp_mag",
    "BP",
    MAG,
    "phot.mag;em.opt.B",
    3,
    "Mean magnitude in the blue half of the optical (BP)",
    withError,
  ),
  column(
    "given",
    "brightness",
    "rp_mag",
    "RP",
    MAG,
    "phot.mag;em.opt.R",
    3,
    "Mean magnitude in the red half of the optical (RP)",
    withError,
  ),
  column("given", "brightness", "v_mag", "V", MAG, "phot.mag;em.opt.V", 3, "Johnson V magnitude", withError),
  column(
    "given",
    "brightness",
    "j_mag",
    "J",
    MAG,
    "phot.mag;em.IR.J",
    3,
    "Near-infrared magnitude, J",
    withError,
  ),
  column(
    "given",
    "brightness",
    "h_mag",
    "H",
    MAG,
    "phot.mag;em.IR.H",
    3,
    "Near-infrared magnitude, H",
    withError,
  ),
  column(
    "given",
    "brightness",
    "ks_mag",
    "Ks",
    MAG,
    "phot.mag;em.IR.K",
    3,
    "Near-infrared magnitude, Ks",
    withError,
  ),
  column(
    "given",
    "brightness",
    "card_mag",
    "Instrument magnitude",
    MAG,
    "phot.mag",
    3,
    "Magnitude in an instrument's own passband, as given",
    withError,
  ),

  column(
    "given",
    "star",
    "logg",
    "log g",
    ["dex(cm.s-2)", "dex"],
    "phys.gravity",
    2,
    "Surface gravity, decimal logarithm of cm/s²",
    withError,
  ),
  column(
    "given",
    "star",
    "feh",
    "[Fe/H]",
    ["dex", "dex"],
    "phys.abund.Fe",
    2,
    "Iron content relative to the Sun",
    withError,
  ),
  column(
    "given",
    "brightness",
    "ebv",
    "E(B − V)",
    ["mag", "mag"],
    "phot.color.excess;em.opt.B;em.opt.V",
    3,
    "Colour excess by dust between the star and the Sun",
    withError,
  ),
  column(
    "given",
    "flags",
    "ruwe",
    "RUWE",
    NONE,
    "stat.error",
    2,
    "Quality of the astrometric fit, near 1 for a single star that fits well",
  ),
  column(
    "given",
    "flags",
    "light_share",
    "Light share",
    NONE,
    "phot.flux;arith.ratio",
    3,
    "Fraction of the light in the aperture that is the target's own: F_target / F_total",
  ),

  column(
    "stellar",
    "star",
    "teff",
    "Teff",
    ["K", "K"],
    "phys.temperature.effective",
    0,
    "Effective temperature: as given, else from colour",
    withError,
  ),
  column(
    "stellar",
    "position",
    "distance",
    "Distance",
    ["pc", "pc"],
    "pos.distance",
    2,
    "Distance: as given, else from the parallax by the recipe",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "brightness",
    "abs_ks",
    "M Ks",
    MAG,
    "phot.mag;em.IR.K;phys.luminosity",
    3,
    "Absolute magnitude in Ks",
    withError,
  ),
  column(
    "stellar",
    "star",
    "radius",
    "Radius",
    ["solRad", "R☉"],
    "phys.size.radius",
    3,
    "Radius of the star",
    withError,
  ),
  column("stellar", "star", "mass", "Mass", ["solMass", "M☉"], "phys.mass", 3, "Mass of the star", withError),
  column(
    "stellar",
    "star",
    "luminosity",
    "Luminosity",
    ["solLum", "L☉"],
    "phys.luminosity",
    5,
    "Bolometric luminosity",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "star",
    "density",
    "Density",
    ["solMass.solRad-3", "ρ☉"],
    "phys.density",
    2,
    "Mean density relative to the Sun",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "hz_inner",
    "HZ inner",
    AU,
    "phys.size.smajAxis;stat.min",
    4,
    "Inner edge of the habitable zone (runaway greenhouse)",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "hz_outer",
    "HZ outer",
    AU,
    "phys.size.smajAxis;stat.max",
    4,
    "Outer edge of the habitable zone (maximum greenhouse)",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "hz_inner_period",
    "HZ inner period",
    DAY,
    "time.period;stat.min",
    2,
    "Orbital period at the inner edge of the habitable zone",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "hz_outer_period",
    "HZ outer period",
    DAY,
    "time.period;stat.max",
    2,
    "Orbital period at the outer edge of the habitable zone",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "earth_distance",
    "1 S⊕ distance",
    AU,
    "phys.size.smajAxis",
    4,
    "Distance at which the insolation is Earth's",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "earth_period",
    "1 S⊕ period",
    DAY,
    "time.period",
    2,
    "Orbital period where the insolation is Earth's",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "zone",
    "transit_probability",
    "P tr",
    ["", "%"],
    "stat.probability",
    2,
    "Geometric probability of a transit where the insolation is Earth's: stellar radius over distance",
    { ...withError, shownFactor: 100 },
  ),
  column(
    "stellar",
    "zone",
    "transit_duration",
    "Duration",
    ["h", "h"],
    "time.duration",
    2,
    "Duration of a transit where the insolation is Earth's, by the recipe's rule for the impact parameter",
    withError,
  ),
  column(
    "stellar",
    "zone",
    "earth_depth",
    "Earth depth",
    ["ppm", "ppm"],
    "phot.flux;arith.diff",
    0,
    "Depth of the transit of a planet of one Earth radius, without limb darkening",
    { ...withError, logAxis: true },
  ),
  column(
    "stellar",
    "flags",
    "flags",
    "Flags",
    NONE,
    "meta.code.qual",
    0,
    "How many warning flags the star carries",
    { kind: "integer" },
  ),

  column(
    "instrument",
    "detectability",
    "noise_1h",
    "Noise 1 h",
    ["ppm", "ppm"],
    "stat.error;phot.flux",
    1,
    "Photometric noise of the instrument on this star in one hour",
    { logAxis: true },
  ),
  column(
    "instrument",
    "detectability",
    "transits",
    "Transits",
    NONE,
    "meta.number",
    0,
    "Transits expected in the campaign where the insolation is Earth's",
    { kind: "integer" },
  ),
  column(
    "instrument",
    "detectability",
    "r_min",
    "R min",
    ["earthRad", "R⊕"],
    "phys.size.radius;stat.min",
    3,
    "Radius of the smallest planet the instrument would find where the insolation is Earth's, with the light share where it is known",
    withError,
  ),
] as const satisfies readonly Column[];

const byKey: ReadonlyMap<string, Column> = new Map(COLUMNS.map((c) => [c.key, c]));

/** The column of that key, or undefined: the one gate through which a name from outside becomes an SQL name. */
export const findColumn = (key: string): Column | undefined => byKey.get(key);

export const columnsOf = (...stages: ColumnStage[]): readonly Column[] =>
  COLUMNS.filter((c: Column) => stages.includes(c.stage));

/** Name of the error partner of a column. */
export const errorKey = (key: string): string => `${key}_err`;

/** Name of the blank-reason partner of a derived column. */
export const blankKey = (key: string): string => `${key}_blank`;

export const isNumeric = (c: Column): boolean => c.kind !== "text";
