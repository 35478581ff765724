import { Random } from "./random.ts";

/**
 * One star of the invented sky. None of them exists: positions, motions and distances are drawn; only the run of
 * brightness, colour and temperature follows the mean main sequence (Pecaut & Mamajek 2013, version 2024.05.15, rounded).
 */
export interface InventedStar {
  readonly designation: string;
  /** 19 digits, as the invented release numbers its sources. */
  readonly sourceId: string;
  /** Position at J2016.0, degrees. */
  readonly ra: number;
  readonly dec: number;
  /** mas/yr, in RA with the cosine. */
  readonly pmra: number;
  readonly pmdec: number;
  readonly pmError: number;
  readonly parallax: number;
  readonly parallaxError: number;
  readonly g: number;
  readonly bp: number;
  readonly rp: number;
  readonly j: number;
  readonly h: number;
  readonly ks: number;
  /** In the passband of an invented instrument, somewhat redder than RP. */
  readonly cardMag: number;
  readonly teff: number;
  readonly logg: number;
  readonly feh: number;
  readonly ruwe: number;
  readonly lightShare: number;
}

/** Teff (K), M_G, BP − RP, M_Ks, radius (R☉), mass (M☉) along the main sequence, cool to hot. */
const SEQUENCE: readonly (readonly [number, number, number, number, number, number])[] = [
  [2680, 14.72, 4.5, 9.7, 0.12, 0.09],
  [2810, 14.26, 4.16, 9.22, 0.137, 0.105],
  [3060, 12.45, 3.35, 8.2, 0.196, 0.155],
  [3210, 11.21, 2.94, 7.36, 0.274, 0.24],
  [3430, 10.05, 2.5, 6.55, 0.361, 0.36],
  [3560, 9.29, 2.23, 5.98, 0.446, 0.45],
  [3660, 8.82, 2.09, 5.64, 0.501, 0.51],
  [3850, 8.1, 1.84, 5.15, 0.588, 0.585],
  [4090, 7.57, 1.7, 4.81, 0.63, 0.64],
  [4440, 6.85, 1.43, 4.397, 0.701, 0.7],
  [4870, 6.22, 1.19, 4.1, 0.755, 0.76],
  [5290, 5.553, 0.983, 3.827, 0.813, 0.86],
  [5660, 4.801, 0.85, 3.345, 0.977, 0.98],
  [5930, 4.325, 0.784, 3.043, 1.1, 1.07],
  [6350, 3.56, 0.64, 2.5, 1.359, 1.25],
  [6820, 2.89, 0.49, 2.045, 1.622, 1.43],
];

const SUN_LOGG = 4.438;

interface Kind {
  readonly share: number;
  /** Stretch of the sequence it is drawn from, as positions in the table. */
  readonly from: number;
  readonly to: number;
  /** Farthest, pc. */
  readonly reach: number;
}

const M_DWARFS: Kind = { share: 0.62, from: 0.5, to: 7.5, reach: 70 };
const DWARFS: readonly Kind[] = [
  M_DWARFS,
  { share: 0.22, from: 7.5, to: 11, reach: 140 },
  { share: 0.16, from: 11, to: 15, reach: 220 },
];

const GIANT_SHARE = 0.05;
const BINARY_SHARE = 0.14;

const along = (position: number, column: number): number => {
  const i = Math.min(SEQUENCE.length - 2, Math.max(0, Math.floor(position)));
  const [a, b] = [SEQUENCE[i]?.[column] ?? 0, SEQUENCE[i + 1]?.[column] ?? 0];
  return a + (position - i) * (b - a);
};

interface Body {
  teff: number;
  absG: number;
  bpRp: number;
  absKs: number;
  logg: number;
  distance: number;
}

const pickDwarf = (random: Random): Kind => {
  let draw = random.uniform();
  for (const kind of DWARFS) {
    if (draw < kind.share) return kind;
    draw -= kind.share;
  }
  return M_DWARFS;
};

const dwarf = (random: Random): Body => {
  const { from, to, reach } = pickDwarf(random);
  const position = random.between(from, to);
  const spread = random.normal(0, 0.08);
  return {
    teff: along(position, 0),
    absG: along(position, 1) + spread,
    bpRp: along(position, 2),
    absKs: along(position, 3) + spread,
    logg: SUN_LOGG + Math.log10(along(position, 5)) - 2 * Math.log10(along(position, 4)),
    distance: reach * Math.cbrt(random.between(0.0005, 1)),
  };
};

const giant = (random: Random): Body => {
  const teff = random.between(3900, 5000);
  const absG = random.normal(0.7, 0.9);
  const bpRp = 1.05 + (5000 - teff) / 1400;
  return {
    teff,
    absG,
    bpRp,
    absKs: absG - 1.1 - 0.9 * bpRp,
    logg: random.between(1.6, 3.1),
    distance: 900 * Math.cbrt(random.between(0.01, 1)),
  };
};

/** A companion of equal light makes a star 0.753 mag brighter; fainter ones less. */
const companionBrightening = (random: Random): number =>
  2.5 * Math.log10(1 + 10 ** (-0.4 * random.between(0, 3)));

const LOW_DIGITS = 1e9;
/** Shares no divisor with `LOW_DIGITS`, so that its multiples end differently for each of the first 10⁹ stars. */
const STRIDE = 61_803_397;

/** Unique within a seed: the last nine digits belong to the star's number alone. */
const sourceNumber = (random: Random, index: number): string => {
  const high =
    3_000_000_000 + Math.floor(random.uniform() * 900_000) * 1000 + Math.floor(random.uniform() * 1000);
  return `${high}${String(((index + 1) * STRIDE) % LOW_DIGITS).padStart(9, "0")}`;
};

const place = (random: Random) => ({
  ra: 360 * random.uniform(),
  dec: (180 / Math.PI) * Math.asin(random.between(-1, 1)),
});

/** Drift of a star of that distance, mas/yr: tangential speeds of some 35 km/s, 4.74 km/s being an au per year. */
const motion = (random: Random, distance: number) => ({
  pmra: (1000 * random.normal(8, 35)) / (4.74 * distance),
  pmdec: (1000 * random.normal(-12, 35)) / (4.74 * distance),
});

/** The star of that number; the same for the same seed, whoever asks for it and in which order. */
export const inventedStar = (seed: number, index: number): InventedStar => {
  const random = new Random(seed, index);
  const body = random.chance(GIANT_SHARE) ? giant(random) : dwarf(random);
  const isBinary = random.chance(BINARY_SHARE);
  const brightening = isBinary ? companionBrightening(random) : 0;
  const modulus = 5 * Math.log10(body.distance) - 5;
  const g = body.absG + modulus - brightening;
  const ks = body.absKs + modulus - brightening;
  const parallaxError =
    0.018 + 0.02 * 10 ** (0.2 * Math.max(0, g - 13)) * (isBinary ? random.between(1, 4) : 1);
  return {
    designation: `SL ${100_000 + index}`,
    sourceId: sourceNumber(random, index),
    ...place(random),
    ...motion(random, body.distance),
    pmError: parallaxError * 1.1,
    parallax: 1000 / body.distance + random.normal(0, parallaxError),
    parallaxError,
    g,
    bp: g + 0.55 * body.bpRp - 0.1,
    rp: g - 0.45 * body.bpRp - 0.1,
    j: ks + 0.83 + random.normal(0, 0.02),
    h: ks + 0.22 + random.normal(0, 0.02),
    ks,
    cardMag: g - 0.53 * body.bpRp - 0.1,
    teff: body.teff + random.normal(0, 55),
    logg: body.logg + random.normal(0, 0.06),
    feh: random.normal(-0.05, 0.18),
    ruwe: isBinary ? random.between(1.1, 5.5) : Math.exp(random.normal(0.02, 0.06)),
    lightShare: random.chance(0.12) ? random.between(0.6, 0.99) : random.between(0.985, 1),
  };
};
