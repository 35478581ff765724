/** Rows to ask astropy about: seeded, so that a failure comes again, with nasty ones in front. */

/** Mulberry32, a public-domain generator: the same rows on every machine. */
const generator = (seed: number): (() => number) => {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
};

const ROWS = 300;

const rows = (seed: number, make: (random: () => number) => number[]): number[][] => {
  const random = generator(seed);
  return Array.from({ length: ROWS }, () => make(random));
};

const between = (random: () => number, low: number, high: number): number => low + (high - low) * random();

/** A direction, evenly over the sphere. */
const direction = (random: () => number): [number, number] => [
  between(random, 0, 360),
  (Math.asin(between(random, -1, 1)) * 180) / Math.PI,
];

/** Directions at which formulas fail: poles, the wrap at 0h, the equator, and a hair beside them. */
const NASTY_DIRECTIONS: [number, number][] = [
  [0, 0],
  [0, 90],
  [123, -90],
  [359.9999999999, 0],
  [1e-12, 1e-12],
  [180, 0],
  [90, 89.9999999],
  [270, -89.9999999],
  [180, -45],
  [266.40498829, -28.93617776],
  [192.85948, 27.12825],
  [270, 66.5607205556],
];

const directions = (seed: number): number[][] => [...NASTY_DIRECTIONS, ...rows(seed, direction)];

/** Julian date between two years. */
const dateBetween = (random: () => number, first: number, last: number): number =>
  2_451_545 + 365.25 * (between(random, first, last) - 2000);

/** Parallax, mas. */
const distances = (): number[][] => [
  [1000],
  [768.0665],
  [0.01],
  ...rows(11, (random) => [10 ** between(random, -2, 3)]),
];

/** Right ascension, declination, parallax (mas), both motions (mas/yr), radial velocity (km/s), years. */
const motions = (): number[][] => [
  [
    269.44850252543836, 4.739420051112412, 546.975939730948, -801.5509783684709, 10362.394206546573, -110.47,
    -16,
  ],
  [
    269.44850252543836, 4.739420051112412, 546.975939730948, -801.5509783684709, 10362.394206546573, -110.47,
    84,
  ],
  [269.44850252543836, 4.739420051112412, 546.975939730948, -801.5509783684709, 10362.394206546573, 0, -16],
  [
    217.39232147200883, -62.67607511676666, 768.0665391873573, -3781.741008265163, 769.4650146478623,
    -21.942726, -16,
  ],
  [0.0001, 0.5, 100, -5000, 100, 30, 30],
  [10, 89.9999, 50, 900, 900, -40, 30],
  [200, -89.9999, 50, -900, 900, 245, 30],
  [10, 10, 0.01, 1, 1, 20, 50],
  ...rows(12, (random) => {
    const parallax = 10 ** between(random, -1, 2);
    // Across the line of sight up to 400 km/s either way: faster ones leave the Galaxy.
    const motion = () => (between(random, -400, 400) * parallax) / 4.74;
    return [
      ...direction(random),
      parallax,
      motion(),
      motion(),
      between(random, -400, 400),
      between(random, -50, 50),
    ];
  }),
];

/** Two directions; some a millionth of an arcsecond to an arcminute apart, some nearly opposite. */
const pairs = (): number[][] => [
  [0, 45, 180, -45.0000001],
  [359.9999, 0, 0.0001, 0],
  [0, 90, 180, 90],
  [10, 20, 10, 20],
  [0, -90, 0, 90],
  ...rows(13, (random) => [...direction(random), ...direction(random)]),
  ...rows(14, (random) => {
    const [ra, dec] = direction(random);
    const step = 10 ** between(random, -10, -2);
    return [ra, dec, ra + between(random, -step, step), Math.min(90, dec + between(random, 0, step))];
  }),
  ...rows(15, (random) => {
    const [ra, dec] = direction(random);
    return [ra, dec, (ra + 180) % 360, Math.max(-90, Math.min(90, 10 ** between(random, -9, -3) - dec))];
  }),
];

/** Right ascension, declination, Julian date (UTC), latitude and east longitude of the site. */
const altitudes = (): number[][] =>
  rows(16, (random) => [
    ...direction(random),
    dateBetween(random, 1975, 2045),
    between(random, -85, 85),
    between(random, -180, 180),
  ]);

/** Julian dates of these years. */
const dates = (seed: number, first: number, last: number): number[][] => [
  [2_451_545],
  [2_446_895.5],
  ...rows(seed, (random) => [dateBetween(random, first, last)]),
];

/** Order, longitude, latitude; not on the corners of pixels, where either answer is right. */
const pixels = (): number[][] => [
  [12, 269.44850252543836, 4.739420051112412],
  [12, 330.79502, 18.88424],
  [12, 359.9, -89.9],
  [24, 10.684708, 41.26875],
  [10, 359.9999999, 0.0000003],
  [8, 0.0001, 89.9999],
  ...rows(17, (random) => [Math.floor(between(random, 0, 25)), ...direction(random)]),
];

/** Order, nested index. */
const neighbours = (): number[][] => [
  ...Array.from({ length: 48 }, (_, pixel) => [1, pixel]),
  ...Array.from({ length: 192 }, (_, pixel) => [2, pixel]),
  ...rows(18, (random) => {
    const order = Math.floor(between(random, 3, 25));
    return [order, Math.floor(random() * 12 * 4 ** order)];
  }),
];

export const makeInputs = () => ({
  /** One row without numbers: the constants have no input. */
  constants: [[]] as number[][],
  distances: distances(),
  /** Besselian epochs. */
  epochs: [[1950], [1900], ...rows(19, (random) => [between(random, 1850, 2000)])],
  motions: motions(),
  /** Right ascension and declination. */
  galactic: directions(20),
  /** Right ascension and declination. */
  ecliptic: directions(21),
  /** Right ascension, declination, Julian date (TT). */
  precession: rows(22, (random) => [...direction(random), dateBetween(random, 1900, 2100)]),
  obliquity: dates(23, 1800, 2200),
  pairs: pairs(),
  altitudes: altitudes(),
  /** Julian dates (UT1). */
  sidereal: dates(24, 1960, 2050),
  /** Julian dates (TT). */
  sun: dates(25, 1950, 2050),
  /** Julian dates (TT). */
  moon: dates(26, 1950, 2050),
  pixels: pixels(),
  neighbours: neighbours(),
});
