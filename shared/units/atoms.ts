/** Single units as files of the trade spell them, each with its dimension and its size in the base of that dimension. */

export type Dimension =
  | "angle"
  | "time"
  | "length"
  | "mass"
  | "temperature"
  | "magnitude"
  | "decade"
  | "energy"
  | "power"
  | "flux"
  | "frequency"
  | "count"
  | "solarRadius"
  | "solarMass"
  | "solarLuminosity"
  | "planetRadius"
  | "planetMass"
  | "number";

export interface Atom {
  readonly dimension: Dimension;
  /** In mas, Julian years, pc, kg, K, mag, dex, J, W, Jy, Hz, or the unit of that name. */
  readonly size: number;
}

const SECONDS_PER_YEAR = 31_557_600;
/** IAU 2012 resolution B2 and IAU 2015 resolution B2: 1 au exactly in metres, 1 pc = 648000/π au. */
const METRES_PER_AU = 149_597_870_700;
const AU_PER_PARSEC = 648_000 / Math.PI;
const METRES_PER_PARSEC = METRES_PER_AU * AU_PER_PARSEC;
const METRES_PER_LIGHT_YEAR = 9_460_730_472_580_800;

type Row = readonly [dimension: Dimension, size: number, spellings: string];

/** With prefixes, each by its symbol. Compared with their case. */
const PREFIXED: readonly Row[] = [
  ["angle", 1000, "as arcsec"],
  ["angle", (180 / Math.PI) * 3_600_000, "rad"],
  ["time", 1 / SECONDS_PER_YEAR, "s"],
  ["time", 1, "yr a"],
  ["length", 1, "pc"],
  ["length", 1 / METRES_PER_PARSEC, "m"],
  ["mass", 0.001, "g"],
  ["temperature", 1, "K"],
  ["magnitude", 1, "mag"],
  ["energy", 1, "J"],
  ["energy", 1e-7, "erg"],
  ["energy", 1.602176634e-19, "eV"],
  ["power", 1, "W"],
  ["flux", 1, "Jy"],
  ["frequency", 1, "Hz"],
];

const PREFIXES: Readonly<Record<string, number>> = {
  n: 1e-9,
  u: 1e-6,
  μ: 1e-6,
  m: 1e-3,
  c: 1e-2,
  d: 0.1,
  k: 1e3,
  M: 1e6,
  G: 1e9,
};

/** Without prefixes; compared without case, after those above. */
const PLAIN: readonly Row[] = [
  ["angle", 3_600_000, "deg degs degree degrees °"],
  ["angle", 60_000, "arcmin arcmins arcminute arcminutes amin arcm ' ′"],
  ["angle", 1000, "arcsec arcsecs arcsecond arcseconds asec arcs \" ″ ''"],
  ["angle", 1, "mas milliarcsec milliarcsecs milliarcsecond milliarcseconds marcsec milliasec"],
  ["angle", 0.001, "uas μas microarcsec microarcsecond microarcseconds uarcsec μarcsec"],
  ["angle", 54_000_000, "hourangle"],
  ["angle", (180 / Math.PI) * 3_600_000, "rad radian radians"],
  ["time", 1, "yr yrs y year years a jyr julianyear annum"],
  ["time", 100, "cy cent century centuries"],
  ["time", 1 / 365.25, "d day days"],
  ["time", 3600 / SECONDS_PER_YEAR, "h hr hrs hour hours"],
  ["time", 60 / SECONDS_PER_YEAR, "min minute minutes"],
  ["time", 1 / SECONDS_PER_YEAR, "s sec secs second seconds"],
  ["length", 1, "pc parsec parsecs"],
  ["length", 1000, "kpc kiloparsec kiloparsecs"],
  ["length", 1 / AU_PER_PARSEC, "au"],
  ["length", METRES_PER_LIGHT_YEAR / METRES_PER_PARSEC, "ly lyr lightyear lightyears"],
  ["length", 1e-10 / METRES_PER_PARSEC, "angstrom angstroms å"],
  ["length", 1e-6 / METRES_PER_PARSEC, "micron microns um μm"],
  ["length", 0.01 / METRES_PER_PARSEC, "cm"],
  ["length", 1000 / METRES_PER_PARSEC, "km"],
  ["temperature", 1, "k kelvin kelvins degk"],
  ["magnitude", 1, "mag mags magnitude magnitudes mag(vega) vegamag mag(ab) abmag"],
  ["magnitude", 0.001, "mmag mmags millimag"],
  ["decade", 1, "dex"],
  ["energy", 1e-7, "erg ergs"],
  ["frequency", 1e6, "mhz"],
  ["count", 1, "ct count counts photon photons ph adu electron electrons e- pix pixel pixels"],
  ["solarRadius", 1, "solrad rsun rsol r_sun r☉ r⊙ r_odot solarradius solarradii solradius"],
  ["solarMass", 1, "solmass msun msol m_sun m☉ m⊙ m_odot solarmass solarmasses"],
  ["solarLuminosity", 1, "sollum lsun lsol l_sun l☉ l⊙ l_odot solarluminosity solarluminosities"],
  ["planetRadius", 1, "earthrad rearth r_earth r⊕ georad jupiterrad rjup r_jup jovrad"],
  ["planetMass", 1, "earthmass mearth m_earth m⊕ geomass jupitermass mjup m_jup jovmass"],
  ["number", 1, "1 - -- --- none unitless dimensionless number solar sun"],
  ["number", 0.01, "% percent"],
  ["number", 1e-6, "ppm"],
];

const fold = (rows: readonly Row[], named: (spelling: string) => string): Map<string, Atom> =>
  new Map(
    rows.flatMap(([dimension, size, spellings]) =>
      spellings.split(" ").map((spelling) => [named(spelling), { dimension, size }] as const),
    ),
  );

const bySymbol = fold(PREFIXED, (symbol) => symbol);
const byWord = fold(PLAIN, (word) => word.toLowerCase());

const prefixed = (symbol: string): Atom | undefined => {
  const whole = bySymbol.get(symbol);
  if (whole) return whole;
  const prefix = PREFIXES[symbol.slice(0, 1)];
  const rest = bySymbol.get(symbol.slice(1));
  return prefix !== undefined && rest ? { ...rest, size: rest.size * prefix } : undefined;
};

/** The unit of that name: by its common words first, then as a symbol with a prefix. */
export const findAtom = (name: string): Atom | undefined =>
  (bySymbol.has(name) ? undefined : byWord.get(name.toLowerCase())) ?? prefixed(name);
