/**
 * Six rows of the star table published with Mann et al. 2015, ApJ 804, 64: temperature (K), radius and mass (solar), [Fe/H],
 * and magnitudes, of which BP and RP are synthetic.
 */
export interface BenchmarkStar {
  readonly name: string;
  readonly teff: number;
  readonly radius: number;
  readonly mass: number;
  readonly feh: number;
  readonly v: number;
  readonly j: number;
  readonly h: number;
  readonly ks: number;
  readonly bp: number;
  readonly rp: number;
}

const star = (name: string, ...n: readonly number[]): BenchmarkStar => {
  const [teff = 0, radius = 0, mass = 0, feh = 0, v = 0, j = 0, h = 0, ks = 0, bp = 0, rp = 0] = n;
  return { name, teff, radius, mass, feh, v, j, h, ks, bp, rp };
};

export const BENCHMARK_STARS: readonly BenchmarkStar[] = [
  star("Gl 15A", 3603, 0.388, 0.398, -0.3, 8.119, 4.896, 4.303, 4.039, 8.532, 6.225),
  star("Gl 15B", 3218, 0.1923, 0.159, -0.3, 11.007, 6.745, 6.211, 5.94, 11.457, 8.414),
  star("Gl 54.1", 3056, 0.168, 0.13, -0.26, 12.082, 7.285, 6.751, 6.441, 12.527, 9.155),
  star("Gl 205", 3801, 0.581, 0.633, 0.49, 7.932, 4.796, 4.123, 3.856, 8.354, 6.161),
  star("Gl 169", 4124, 0.687, 0.744, 0.39, 8.335, 5.698, 5.044, 4.853, 8.711, 6.812),
  star("GJ 3146", 2829, 0.1447, 0.103, -0.03, 15.758, 9.858, 9.316, 8.988, 16.243, 12.097),
];
