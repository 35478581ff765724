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

/** Parallax, mas. */
const distances = (): number[][] => [
  [1000],
  [768.0665],
  [0.01],
  ...rows(11, (random) => [10 ** between(random, -2, 3)]),
];

export const makeInputs = () => ({
  /** One row without numbers: the constants have no input. */
  constants: [[]] as number[][],
  distances: distances(),
});
