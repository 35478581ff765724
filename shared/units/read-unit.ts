import { type Dimension, findAtom } from "./atoms.ts";

/** A unit as it is understood. */
export interface ReadUnit {
  /** Powers of the dimensions in their order, e.g. `angle time-1`; empty for pure numbers. */
  readonly dimension: string;
  /** Size in the bases of the dimensions. */
  readonly size: number;
  /** Whether the numbers are decimal logarithms of it. */
  readonly isLog: boolean;
}

/** Names of several words, as one. */
const PHRASES: readonly (readonly [RegExp, string])[] = [
  [/\bsolar\s+(radi|mass|lumin)/gi, "solar$1"],
  [/\bjulian\s+years?\b/gi, "yr"],
  [/\bmilli[\s-]+arc[\s-]*sec(ond)?s?\b/gi, "mas"],
  [/\bmicro[\s-]+arc[\s-]*sec(ond)?s?\b/gi, "uas"],
  [/\barc\s+(sec|min)/gi, "arc$1"],
  [/\blight\s+years?\b/gi, "ly"],
  [/\s*\bper\b\s*/gi, "/"],
  // Some archives name the dimension too: `Angle[mas]/Time[Julian years]`.
  [/\b(?:time|angle)\[([^\]]*)\]/gi, "$1"],
];

const made = (spelling: string): string => {
  let text = spelling.trim().replaceAll("″", '"').replaceAll("′", "'").replaceAll("º", "°").normalize("NFKC");
  text = text
    .replace(/[\u2212\u2013\u2014]/g, "-")
    .replace(/\\(?:rm|mathrm|,|cdot)/g, " ")
    .replace(/[${}]/g, "");
  for (const [phrase, word] of PHRASES) text = text.replace(phrase, word);
  text = text.trim();
  // Quotes and rounded brackets around the whole are no part of it.
  return /^"[^"]+"$|^\([^()]*\)$/.test(text) ? text.slice(1, -1).trim() : text;
};

/** `10+3`, `10**-3`, `10^3`, `1e-3`, `0.001` in front of a unit. */
const SCALE =
  /^(?:10(?:\*\*|\^)?\(?([+-]\d+)\)?|10(?:\*\*|\^)(\d+)|(\d+(?:\.\d+)?(?:[eE][+-]?\d+)?))(?=$|[^\d])/;

const takeScale = (text: string): { scale: number; rest: string } => {
  const found = SCALE.exec(text);
  if (!found) return { scale: 1, rest: text };
  const power = found[1] ?? found[2];
  return {
    scale: power === undefined ? Number(found[3]) : Number(`1e${power}`),
    rest: text.slice(found[0].length).replace(/^[\s.*·⋅×x]+(?=[A-Za-zμ%"'°])/, ""),
  };
};

const FACTOR = /^(.*?[^\d+.^*(-])(?:(?:\*\*|\^)?\(?([+-]?\d+)\)?)?$/;

interface Powers {
  size: number;
  readonly of: Map<Dimension, number>;
}

const multiply = (powers: Powers, factor: string, sign: 1 | -1): boolean => {
  const whole = findAtom(factor);
  const parts = whole ? null : FACTOR.exec(factor);
  const atom = whole ?? (parts?.[1] === undefined ? undefined : findAtom(parts[1]));
  if (!atom) return false;
  const power = sign * (parts?.[2] === undefined ? 1 : Number(parts[2]));
  powers.size *= atom.size ** power;
  if (atom.dimension !== "number")
    powers.of.set(atom.dimension, (powers.of.get(atom.dimension) ?? 0) + power);
  return true;
};

/** Products and quotients from left to right: `mas.yr-1`, `mas/yr`, `mas yr**-1`, `cm / s^2`. */
const readProduct = (text: string): Omit<ReadUnit, "isLog"> | undefined => {
  const { scale, rest } = takeScale(text);
  const powers: Powers = { size: scale, of: new Map() };
  const whole = rest === "" || findAtom(rest) ? [rest] : null;
  const parts =
    whole ??
    rest
      .replace(/\s*\/\s*/g, " /")
      .replace(/\*\*/g, "^")
      .replace(/\s*\^\s*/g, "^")
      .split(/[\s.*·⋅×]+/)
      .filter((part) => part !== "");
  if (rest === "" && scale === 1 && text === "") return undefined;
  for (const part of parts) {
    if (part === "") continue;
    const isUnder = part.startsWith("/") && part.length > 1;
    const name = isUnder ? part.slice(1).replace(/^\((.*)\)$/, "$1") : part;
    if (!multiply(powers, name, isUnder ? -1 : 1)) return undefined;
  }
  const dimension = [...powers.of]
    .filter(([, power]) => power !== 0)
    .toSorted(([a], [b]) => (a < b ? -1 : 1))
    .map(([name, power]) => (power === 1 ? name : `${name}${power}`))
    .join(" ");
  return { dimension, size: powers.size };
};

const LOG = /^(?:dex|log(?:10|_?10)?)\s*[([]\s*(.*?)\s*[)\]]$/i;
const BARE_LOG = /^log(?:10)?[\s.]+(.+)$/i;
const BRACKETS = /^\[\s*(.*?)\s*\]$/;

const asLog = (inside: string): ReadUnit | undefined => {
  const read = /^(?:cgs|si)$/i.test(inside)
    ? readProduct(/^si$/i.test(inside) ? "m/s2" : "cm/s2")
    : readProduct(inside === "" ? "-" : inside);
  return read && { ...read, isLog: true };
};

/**
 * What a spelling of a unit says; undefined for one that is not understood, and for none. VOUnit, CDS and FITS spellings and
 * common words. `log(cm/s2)`, `dex(cm.s-2)`, `[cm/s2]` and `[-]` are decimal logarithms; brackets around an angle, a time or
 * a magnitude are only brackets.
 */
export const readUnit = (spelling: string): ReadUnit | undefined => {
  const text = made(spelling);
  const direct = readProduct(text);
  if (direct) return { ...direct, isLog: false };
  const log = LOG.exec(text) ?? BARE_LOG.exec(text);
  if (log) return asLog(log[1] ?? "");
  const inside = BRACKETS.exec(text)?.[1];
  if (inside === undefined) return undefined;
  const read = readProduct(inside === "" ? "-" : inside);
  const isOnlyBracketed = read !== undefined && /^(?:angle|time|magnitude|decade)/.test(read.dimension);
  return read && { ...read, isLog: !isOnlyBracketed };
};
