import type { CardSettings } from "#shared/science/cards.ts";
import { brightestUsable, type NoiseParts, noiseParts } from "#shared/science/noise.ts";

type PartKey = keyof NoiseParts;

interface Part {
  readonly key: PartKey;
  readonly label: string;
  readonly color: string;
  /** Dashes tell the lines apart where colours cannot. */
  readonly dash: string;
  readonly width: number;
}

/** The parts in the order in which they are drawn; the total comes last and lies on top. */
export const PARTS: readonly Part[] = [
  { key: "scintillation", label: "scintillation", color: "var(--blue)", dash: "7 4", width: 1.6 },
  { key: "floor", label: "floor", color: "var(--gold)", dash: "2 4", width: 1.6 },
  { key: "photon", label: "photons", color: "var(--zone)", dash: "", width: 1.6 },
  { key: "background", label: "background", color: "var(--soft)", dash: "10 3 2 3", width: 1.6 },
  { key: "read", label: "read", color: "var(--faint)", dash: "1 3", width: 1.6 },
  { key: "dark", label: "dark", color: "var(--faint)", dash: "12 6", width: 1.2 },
  { key: "digitisation", label: "digitisation", color: "var(--soft)", dash: "1 6", width: 1.6 },
  { key: "jitter", label: "jitter", color: "var(--blue)", dash: "3 3", width: 1.6 },
  { key: "red", label: "red noise", color: "var(--gold)", dash: "14 4 2 4", width: 1.6 },
  { key: "total", label: "total", color: "var(--mark)", dash: "", width: 2.6 },
];

export interface Axes {
  /** Magnitudes drawn. */
  readonly least: number;
  readonly most: number;
  /** Noise drawn, ppm. */
  readonly low: number;
  readonly high: number;
}

/** Margins of the picture beyond the limits of use, mag. */
const BEYOND = 1;
/** A part this many times below the least total is no longer drawn. */
const DEPTH = 12;

const roundDown = (value: number): number => 10 ** Math.floor(Math.log10(value));

/** 10, 30, 100, 300 …: plain numbers about evenly apart on a logarithmic axis. */
export const noiseTicks = ({ low, high }: Axes): number[] => {
  const ticks: number[] = [];
  for (let decade = roundDown(low); decade <= high; decade *= 10)
    for (const step of [1, 3]) {
      const tick = decade * step;
      if (tick >= low * 0.999 && tick <= high * 1.001) ticks.push(tick);
    }
  return ticks;
};

export const magnitudeTicks = ({ least, most }: Axes): number[] => {
  const step = most - least > 16 ? 2 : 1;
  const first = Math.ceil(least / step) * step;
  return Array.from({ length: Math.floor((most - first) / step) + 1 }, (_, i) => first + i * step);
};

export const axesOf = (card: CardSettings): Axes => {
  const least = Math.floor(card.brightLimit - BEYOND);
  const most = Math.ceil(card.faintLimit + BEYOND);
  const totals = [least, most].map((m) => noiseParts(card, m).total);
  const lowest = Math.max(Math.min(...totals), 1e-3);
  const highest = Math.max(Math.max(...totals), lowest * 10);
  return { least, most, low: lowest / DEPTH, high: highest * 1.3 };
};

/** Points of a part, magnitude and ppm, without those outside the axes. */
export const curve = (card: CardSettings, key: PartKey, axes: Axes): [number, number][] => {
  const points: [number, number][] = [];
  const steps = 160;
  for (let i = 0; i <= steps; i++) {
    const magnitude = axes.least + ((axes.most - axes.least) * i) / steps;
    const value = noiseParts(card, magnitude)[key];
    if (value >= axes.low && value <= axes.high) points.push([magnitude, value]);
  }
  return points;
};

/** Moves the places apart until each has its room, keeping their order; none leaves the axis. */
export const spread = (places: readonly number[], room: number, most: number): number[] => {
  const order = places.map((place, i) => ({ place, i })).sort((a, b) => a.place - b.place);
  let before = Number.NEGATIVE_INFINITY;
  for (const entry of order) {
    entry.place = Math.max(entry.place, before + room);
    before = entry.place;
  }
  let after = most + room;
  for (const entry of order.toReversed()) {
    entry.place = Math.min(entry.place, after - room);
    after = entry.place;
  }
  const spreadOut = [...places];
  for (const { place, i } of order) spreadOut[i] = place;
  return spreadOut;
};

/** The largest part at that magnitude, in words. */
export const largestPart = (parts: NoiseParts): string => {
  const named = PARTS.filter(({ key }) => key !== "total");
  const largest = named.reduce((a, b) => (parts[b.key] > parts[a.key] ? b : a));
  const words: Partial<Record<PartKey, string>> = {
    photon: "the star's own photons are",
    floor: "the floor is",
    background: "the background is",
    read: "reading the detector is",
    dark: "dark current is",
    jitter: "pointing jitter is",
  };
  return words[largest.key] ?? `${largest.label} is`;
};

type Usable = "usable" | "saturated" | "too faint" | "never";

/** Whether the card measures a star of that magnitude, and if not why. */
export const usableAt = (card: CardSettings, magnitude: number): Usable => {
  const brightest = brightestUsable(card);
  if (Number.isNaN(brightest)) return "never";
  if (magnitude < brightest) return "saturated";
  return magnitude > card.faintLimit ? "too faint" : "usable";
};
