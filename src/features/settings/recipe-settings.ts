import { INNER_LIMITS, OUTER_LIMITS, RECIPE_RANGES } from "#shared/api/recipes.ts";
import {
  COOL_COLOURS,
  DISTANCE_METHODS,
  LUMINOSITY_METHODS,
  MASS_METHODS,
  RADIUS_METHODS,
  SUNLIKE_COLOURS,
  TEFF_METHODS,
} from "#shared/science/recipes.ts";

interface Common {
  /** Where it stands in the settings. */
  readonly path: string;
  readonly label: string;
  readonly hint?: string;
  /** Where the relation or its customary value is published. */
  readonly source?: string;
  /** It applies only while a choice has this value. */
  readonly when?: { readonly choice: "extinctionRule" | "prior"; readonly is: string };
}

export interface Option {
  readonly value: string;
  readonly label: string;
}

interface Figure extends Common {
  readonly unit: string;
  readonly range: keyof typeof RECIPE_RANGES;
}

interface Choice extends Common {
  readonly options: readonly Option[];
}

type Labels<Value extends string> = Readonly<Record<Value, string>>;

const optionsOf = <Value extends string>(values: readonly Value[], labels: Labels<Value>): Option[] =>
  values.map((value) => ({ value, label: labels[value] }));

const BANDS: Readonly<Record<string, string>> = {
  bp: "BP",
  rp: "RP",
  g: "G",
  v: "V",
  j: "J",
  h: "H",
  ks: "Ks",
};

/** "bp-rp" as astronomers write it: BP − RP. */
const colours = (keys: readonly string[]): Option[] =>
  keys.map((value) => ({
    value,
    label: value
      .split("-")
      .map((band) => BANDS[band] ?? band)
      .join("\u00a0−\u00a0"),
  }));

const COOL_SOURCE = "Mann et al. 2015, ApJ 804, 64";
const SUNLIKE_SOURCE = "Casagrande et al. 2021, MNRAS 507, 2684";
const ZONE_SOURCE = "Kopparapu et al. 2014, ApJ 787, L29, Table 1";
const ORBIT_SOURCE = "Barnes 2007, PASP 119, 986; Burke 2008, ApJ 679, 1566";
const BETA_SOURCE = "Kipping 2013, MNRAS 434, L51: 0.867 and 3.03";

/** Settings that are numbers. */
export const FIGURES = {
  fractionLimit: {
    path: "distance.fractionLimit",
    label: "Largest parallax error over parallax",
    unit: "",
    range: "fractionLimit",
    hint: "With a larger one there is no distance by inversion.",
    source: "Luri et al. 2018, A&A 616, A9",
  },
  zeroPointMas: {
    path: "distance.zeroPointMas",
    label: "Offset taken off the parallaxes",
    unit: "mas",
    range: "zeroPointMas",
    source: "Lindegren et al. 2021, A&A 649, A4: about −0.02 mas on average",
  },
  priorLengthPc: {
    path: "distance.priorLengthPc",
    label: "Length scale of the volume prior",
    unit: "pc",
    range: "priorLengthPc",
    source: "Bailer-Jones 2015, PASP 127, 994; 1350 pc: Astraatmadja & Bailer-Jones 2016, ApJ 833, 119",
  },
  ruweLimit: {
    path: "astrometricQuality.limit",
    label: "RUWE above which a star may be two",
    unit: "",
    range: "ruweLimit",
    hint: "For every release without a limit of its own.",
    source: "1.4 is common practice",
  },
  ebv: {
    path: "extinction.ebv",
    label: "Colour excess E(B − V)",
    unit: "mag",
    range: "ebv",
    when: { choice: "extinctionRule", is: "constant" },
  },
  ebvPerKpc: {
    path: "extinction.ebvPerKpc",
    label: "Colour excess E(B − V) by distance",
    unit: "mag/kpc",
    range: "ebvPerKpc",
    when: { choice: "extinctionRule", is: "by-distance" },
  },
  logg: { path: "assumed.logg", label: "log g", unit: "dex", range: "logg", source: "Common practice" },
  loggError: { path: "assumed.loggError", label: "Error of log g", unit: "dex", range: "loggError" },
  feh: {
    path: "assumed.feh",
    label: "[Fe/H]",
    unit: "dex",
    range: "feh",
    source: `Range: ${SUNLIKE_SOURCE}`,
  },
  fehError: { path: "assumed.fehError", label: "Error of [Fe/H]", unit: "dex", range: "fehError" },
  coolestSunlikeK: {
    path: "ranges.coolestSunlikeK",
    label: "Coolest star with a sun-like temperature",
    unit: "K",
    range: "coolestSunlikeK",
    source: SUNLIKE_SOURCE,
  },
  hottestCoolDwarfK: {
    path: "ranges.hottestCoolDwarfK",
    label: "Hottest cool dwarf",
    unit: "K",
    range: "hottestCoolDwarfK",
    source: `${COOL_SOURCE}: calibrated from 2700 to 4100 K`,
  },
  brightestAbsKs: {
    path: "ranges.brightestAbsKs",
    label: "Brightest M_Ks of a cool dwarf",
    unit: "mag",
    range: "absKs",
    source: COOL_SOURCE,
  },
  faintestAbsKs: {
    path: "ranges.faintestAbsKs",
    label: "Faintest M_Ks of a cool dwarf",
    unit: "mag",
    range: "absKs",
    source: COOL_SOURCE,
  },
  e: {
    path: "eccentricity.e",
    label: "Eccentricity of every orbit",
    unit: "",
    range: "e",
    source: ORBIT_SOURCE,
    when: { choice: "prior", is: "fixed" },
  },
  alpha: {
    path: "eccentricity.alpha",
    label: "First exponent α",
    unit: "",
    range: "alpha",
    source: BETA_SOURCE,
    when: { choice: "prior", is: "beta" },
  },
  beta: {
    path: "eccentricity.beta",
    label: "Second exponent β",
    unit: "",
    range: "beta",
    source: BETA_SOURCE,
    when: { choice: "prior", is: "beta" },
  },
} as const satisfies Record<string, Figure>;

const ZONE_LABELS = {
  "recent-venus": "Recent Venus, optimistic",
  "runaway-greenhouse": "Runaway greenhouse",
  "runaway-greenhouse-5-earths": "Runaway greenhouse, 5 Earth masses",
  "runaway-greenhouse-0.1-earths": "Runaway greenhouse, 0.1 Earth masses",
  "maximum-greenhouse": "Maximum greenhouse",
  "early-mars": "Early Mars, optimistic",
} as const;

/** Words for a setting that is on or off. */
export const ON_OFF = { on: "yes", off: "no" } as const;

/** Settings that are one of a few words. */
export const CHOICES = {
  extinctionRule: {
    path: "extinction.rule",
    label: "Extinction by dust",
    options: [
      { value: "off", label: "None" },
      { value: "constant", label: "The same for every star" },
      { value: "column", label: "As the extract gives it" },
      { value: "by-distance", label: "In proportion to the distance" },
    ],
    hint: "Dims and reddens every star before anything else is derived.",
  },
  usesFeh: {
    path: "usesFeh",
    label: "[Fe/H] enters radius and mass",
    options: [
      { value: ON_OFF.on, label: "Where it is given" },
      { value: ON_OFF.off, label: "Never" },
    ],
    source: `${COOL_SOURCE}, eq. 5; Mann et al. 2019, ApJ 871, 63, eq. 5`,
  },
  inner: {
    path: "habitableZone.inner",
    label: "Inner limit",
    options: optionsOf(INNER_LIMITS, ZONE_LABELS),
    source: ZONE_SOURCE,
  },
  outer: {
    path: "habitableZone.outer",
    label: "Outer limit",
    options: optionsOf(OUTER_LIMITS, ZONE_LABELS),
    source: ZONE_SOURCE,
  },
  prior: {
    path: "eccentricity.prior",
    label: "Orbits",
    options: [
      { value: "circular", label: "Circular" },
      { value: "fixed", label: "One eccentricity for all" },
      { value: "beta", label: "Eccentricities by a beta distribution" },
    ],
    source: ORBIT_SOURCE,
  },
  duration: {
    path: "duration",
    label: "Duration of a transit",
    options: [
      { value: "central", label: "Central transit" },
      { value: "averaged", label: "Mean over all impact parameters" },
    ],
  },
  statistic: {
    path: "statistic",
    label: "A signal is weighed",
    options: [
      { value: "campaign", label: "As the campaign says" },
      { value: "boxcar", label: "Always as a box" },
      { value: "trapezoid", label: "Always as a trapezoid" },
    ],
  },
} as const satisfies Record<string, Choice>;

const IN_ORDER = "The first that holds for a star serves.";

/** Settings that are an order of preference. */
export const ORDERS = {
  distanceOrder: {
    path: "distance.order",
    label: "Distance comes from",
    options: optionsOf(DISTANCE_METHODS, {
      "given-distance": "Distance as given",
      inversion: "Inverse of the parallax",
      "volume-prior": "Parallax with a volume prior",
    }),
    hint: IN_ORDER,
  },
  teff: {
    path: "teff",
    label: "Temperature comes from",
    options: optionsOf(TEFF_METHODS, {
      given: "Temperature as given",
      "sunlike-colour": "Colour of a sun-like star",
      "cool-colour": "Colour of a cool dwarf",
    }),
    hint: IN_ORDER,
  },
  sunlikeColours: {
    path: "sunlikeColours",
    label: "Colours of sun-like stars",
    options: colours(SUNLIKE_COLOURS),
    hint: IN_ORDER,
    source: SUNLIKE_SOURCE,
  },
  coolColours: {
    path: "coolColours",
    label: "Colours of cool dwarfs",
    options: colours(COOL_COLOURS),
    hint: IN_ORDER,
    source: `${COOL_SOURCE}, Table 2`,
  },
  radius: {
    path: "radius",
    label: "Radius comes from",
    options: optionsOf(RADIUS_METHODS, {
      "abs-ks": "M_Ks of a cool dwarf",
      "light-and-temperature": "Luminosity and temperature",
      spectrum: "Temperature, log g and [Fe/H]",
    }),
    hint: IN_ORDER,
    source: `${COOL_SOURCE}, Table 1; Torres et al. 2010, A&A Rev. 18, 67`,
  },
  mass: {
    path: "mass",
    label: "Mass comes from",
    options: optionsOf(MASS_METHODS, {
      "abs-ks": "M_Ks of a cool dwarf",
      spectrum: "Temperature, log g and [Fe/H]",
    }),
    hint: IN_ORDER,
    source: "Mann et al. 2019, ApJ 871, 63; Torres et al. 2010, A&A Rev. 18, 67",
  },
  luminosity: {
    path: "luminosity",
    label: "Luminosity comes from",
    options: optionsOf(LUMINOSITY_METHODS, {
      "correction-ks": "Ks with a bolometric correction",
      "correction-g": "G with a bolometric correction",
      "radius-and-temperature": "Radius and temperature",
    }),
    hint: IN_ORDER,
    source: `Ks: a fit of this project to the stars of ${COOL_SOURCE}; G: Andrae et al. 2018, A&A 616, A8, eq. 7`,
  },
} as const satisfies Record<string, Choice>;

export const RELEASES: Common = {
  path: "astrometricQuality.byRelease",
  label: "Limits of single releases",
  hint: "Named as the extracts name them, to the letter.",
};

export type FigureKey = keyof typeof FIGURES;
export type ChoiceKey = keyof typeof CHOICES;
export type OrderKey = keyof typeof ORDERS;
export type SettingKey = FigureKey | ChoiceKey | OrderKey | "releases";

export const isFigure = (key: SettingKey): key is FigureKey => Object.hasOwn(FIGURES, key);
export const isChoice = (key: SettingKey): key is ChoiceKey => Object.hasOwn(CHOICES, key);
export const isOrder = (key: SettingKey): key is OrderKey => Object.hasOwn(ORDERS, key);

/** What is said of a setting, whatever its kind. */
export const aboutSetting = (key: SettingKey): Common => {
  if (isFigure(key)) return FIGURES[key];
  if (isChoice(key)) return CHOICES[key];
  return isOrder(key) ? ORDERS[key] : RELEASES;
};

/** The range of a number in words: "4.6 to 9.8 mag". */
export const rangeWords = (key: FigureKey): string => {
  const { range, unit } = FIGURES[key];
  const [least, most] = RECIPE_RANGES[range];
  return `${figureWords(least)} to ${figureWords(most)}${unit === "" ? "" : ` ${unit}`}`;
};

/** A number with every digit it has and a true minus. */
export const figureWords = (value: number): string => String(value).replace("-", "−");

interface Group {
  readonly title: string;
  readonly note?: string;
  readonly keys: readonly SettingKey[];
}

/** Every setting once, in the order in which a star is derived. */
export const GROUPS: readonly Group[] = [
  { title: "Distance", keys: ["distanceOrder", "fractionLimit", "zeroPointMas", "priorLengthPc"] },
  { title: "Astrometric quality", keys: ["ruweLimit", "releases"] },
  { title: "Extinction", keys: ["extinctionRule", "ebv", "ebvPerKpc"] },
  {
    title: "Assumed of dwarfs",
    note: "Where log g or [Fe/H] is not given; what rests on it is marked as assumed.",
    keys: ["logg", "loggError", "feh", "fehError"],
  },
  {
    title: "Temperature",
    keys: ["teff", "sunlikeColours", "coolColours", "coolestSunlikeK", "hottestCoolDwarfK"],
  },
  {
    title: "Radius, mass, luminosity",
    keys: ["radius", "mass", "luminosity", "usesFeh", "brightestAbsKs", "faintestAbsKs"],
  },
  { title: "Habitable zone", keys: ["inner", "outer"] },
  { title: "Orbits and transits", keys: ["prior", "e", "alpha", "beta", "duration", "statistic"] },
];
