/** Lower and upper bound; null where the source sets none. */
type Bounds = readonly [least: number | null, most: number | null];

/**
 * How often a kind of planet occurs. A number is nothing without its bounds: they stand beside it, and every one is a default
 * that may be edited.
 */
export interface Occurrence {
  readonly key: string;
  readonly planets: string;
  readonly stars: string;
  /** What the number counts. */
  readonly per: "planets per star" | "share of stars";
  readonly value: number;
  /** Errors upwards and downwards, both positive; null where the source gives none. */
  readonly errorUp: number | null;
  readonly errorDown: number | null;
  /** Radius of the planet, Earth radii. */
  readonly radius: Bounds;
  /** Period, days; null where the habitable zone bounds the orbit instead. */
  readonly period: Bounds | null;
  readonly source: string;
  /** Whether the number was compared with the paper or its abstract. */
  readonly status: "verified" | "from memory";
}

/** What rows of one paper have in common. */
type Survey = Pick<Occurrence, "stars" | "source" | "status">;

type Estimate = readonly [value: number, errorUp: number | null, errorDown: number | null];

const survey = (stars: string, source: string, status: Occurrence["status"]): Survey => ({
  stars,
  source,
  status,
});

const found = (
  key: string,
  planets: string,
  by: Survey,
  [value, errorUp, errorDown]: Estimate,
  radius: Bounds,
  period: Bounds | null,
  per: Occurrence["per"] = "planets per star",
): Occurrence => ({ key, planets, ...by, per, value, errorUp, errorDown, radius, period });

const NEIGHBOURS = survey("F, G and K dwarfs nearby", "Wright et al. 2012, ApJ 753, 160", "verified");
const VELOCITIES = survey("F, G and K dwarfs", "Mayor et al. 2011, arXiv:1109.2497", "from memory");
const GK_TRANSITS = survey("G and K dwarfs", "Howard et al. 2012, ApJS 201, 15", "from memory");
const GIANTS = survey("F, G and K dwarfs", "Fressin et al. 2013, ApJ 766, 81", "from memory");
const EARTHS = survey("F, G and K dwarfs", "Fressin et al. 2013, ApJ 766, 81", "verified");
const YEARS = survey("G and K dwarfs", "Petigura et al. 2013, PNAS 110, 19273", "from memory");
const GK_SMALL = survey("G and K dwarfs", "Burke et al. 2015, ApJ 809, 8", "from memory");
const ZONES = survey("Dwarfs of 4800 to 6300 K", "Bryson et al. 2021, AJ 161, 36", "verified");
const EARLY_M = survey("Early M dwarfs", "Dressing & Charbonneau 2015, ApJ 807, 45", "verified");
const COOL = survey("Dwarfs below 4000 K", "Dressing & Charbonneau 2013, ApJ 767, 95", "verified");
const LOW_MASS = survey("M dwarfs of low mass", "Bryant et al. 2023, MNRAS 521, 3663", "from memory");
const midM = (type: string): Survey =>
  survey(`${type} dwarfs`, "Hardegree-Ullman et al. 2019, AJ 158, 75", "from memory");

const ANY: Bounds = [null, null];
const under = (days: number): Bounds => [null, days];
/** Conservative: from the moist or runaway to the maximum greenhouse. Optimistic: from recent Venus to early Mars. */
const CONSERVATIVE = "In the conservative habitable zone";
const OPTIMISTIC = "In the optimistic habitable zone";

/** Defaults, from giants to small planets, each as its source defines it. */
export const OCCURRENCES: readonly Occurrence[] = [
  found("hot-jupiters-nearby", "Hot Jupiters", NEIGHBOURS, [0.012, 0.0038, 0.0038], ANY, under(10)),
  found("hot-jupiters-velocities", "Hot Jupiters", VELOCITIES, [0.0089, 0.0036, 0.0036], ANY, under(10)),
  found("hot-jupiters-transits", "Hot Jupiters", GK_TRANSITS, [0.004, 0.001, 0.001], ANY, under(10)),
  found("giants-fgk", "Giants", GIANTS, [0.0043, 0.0005, 0.0005], [6, 22], [0.8, 10]),
  found("giants-m", "Giants", LOW_MASS, [0.00194, 0.00072, 0.00072], ANY, under(10)),
  found("earths-fgk", "Earth-size", EARTHS, [0.165, 0.036, 0.036], [0.8, 1.25], under(85), "share of stars"),
  found("earths-year", "Earth-size", YEARS, [0.057, 0.017, 0.022], [1, 2], [200, 400]),
  found("small-gk", "Small planets", GK_SMALL, [0.77, 1.13, 0.47], [0.75, 2.5], [50, 300]),
  // The source gives each zone as a range: both of its ends.
  found("zone-conservative-least", CONSERVATIVE, ZONES, [0.37, 0.48, 0.21], [0.5, 1.5], null),
  found("zone-conservative-most", CONSERVATIVE, ZONES, [0.6, 0.9, 0.36], [0.5, 1.5], null),
  found("zone-optimistic-least", OPTIMISTIC, ZONES, [0.58, 0.73, 0.33], [0.5, 1.5], null),
  found("zone-optimistic-most", OPTIMISTIC, ZONES, [0.88, 1.28, 0.51], [0.5, 1.5], null),
  found("small-early-m", "Small planets", EARLY_M, [2.5, 0.2, 0.2], [1, 4], under(200)),
  found("earths-early-m", "Earth-size", EARLY_M, [0.56, 0.06, 0.05], [1, 1.5], under(50)),
  found("super-earths-early-m", "Super-Earths", EARLY_M, [0.46, 0.07, 0.05], [1.5, 2], under(50)),
  found("earths-zone-conservative-m", CONSERVATIVE, EARLY_M, [0.16, 0.17, 0.07], [1, 1.5], null),
  found("super-earths-zone-conservative-m", CONSERVATIVE, EARLY_M, [0.12, 0.1, 0.05], [1.5, 2], null),
  found("earths-zone-optimistic-m", OPTIMISTIC, EARLY_M, [0.24, 0.18, 0.08], [1, 1.5], null),
  found("super-earths-zone-optimistic-m", OPTIMISTIC, EARLY_M, [0.21, 0.11, 0.06], [1.5, 2], null),
  found("small-cool", "Small planets", COOL, [0.9, 0.04, 0.03], [0.5, 4], under(50)),
  found("small-m3", "Small planets", midM("M3"), [0.86, null, null], [0.5, 2.5], under(10)),
  found("small-m4", "Small planets", midM("M4"), [1.36, null, null], [0.5, 2.5], under(10)),
  found("small-m5", "Small planets", midM("M5"), [3.07, null, null], [0.5, 2.5], under(10)),
];
