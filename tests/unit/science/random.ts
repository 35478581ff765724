/** Normal deviates from a fixed seed (mulberry32, Box–Muller), so that a test draws the same numbers every time. */
export const normalDeviates = (seed: number): (() => number) => {
  let state = seed;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
};

/** Mean and standard deviation of a quantity over that many draws. */
export const spreadOf = (draws: number, draw: () => number): { mean: number; deviation: number } => {
  let sum = 0;
  let squares = 0;
  const first = draw();
  for (let i = 0; i < draws; i++) {
    const value = draw() - first;
    sum += value;
    squares += value * value;
  }
  const mean = sum / draws;
  return { mean: first + mean, deviation: Math.sqrt(squares / draws - mean * mean) };
};
