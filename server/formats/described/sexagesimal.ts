import type { DescribedField } from "./field.ts";

/** The parts of a right ascension or a declination that stand in columns of their own, by their places. */
export interface SexagesimalGroup {
  readonly kind: "RA" | "DE";
  /** Places among the fields; −1 where the table has no such part. */
  readonly sign: number;
  readonly whole: number;
  readonly minutes: number;
  readonly seconds: number;
  /** Letters that the labels have behind, such as those of a second position. */
  readonly suffix: string;
}

const LABEL = /^(?:(RA)([hms])|(DE)([-dms]))(\w*)$/;

interface Part {
  readonly kind: "RA" | "DE";
  readonly part: string;
  readonly suffix: string;
  readonly at: number;
}

const partOf = ({ label }: DescribedField, at: number): Part[] => {
  const [, ra, raPart = "", , dePart = "", suffix = ""] = LABEL.exec(label) ?? [];
  if (raPart === "" && dePart === "") return [];
  return [{ kind: ra ? "RA" : "DE", part: raPart || dePart, suffix, at }];
};

const groupOf = (parts: readonly Part[], kind: "RA" | "DE", suffix: string): SexagesimalGroup[] => {
  const placeOf = (letter: string): number =>
    parts.find((p) => p.kind === kind && p.suffix === suffix && p.part === letter)?.at ?? -1;
  const group = {
    kind,
    suffix,
    sign: placeOf("-"),
    whole: placeOf(kind === "RA" ? "h" : "d"),
    minutes: placeOf("m"),
    seconds: placeOf("s"),
  };
  return group.whole >= 0 && group.minutes >= 0 ? [group] : [];
};

/** Right ascensions and declinations whose hours, degrees, minutes and seconds are columns of their own. */
export const sexagesimalGroups = (fields: readonly DescribedField[]): SexagesimalGroup[] => {
  const parts = fields.flatMap(partOf);
  const suffixes = [...new Set(parts.map(({ suffix }) => suffix))];
  return suffixes.flatMap((suffix) => [...groupOf(parts, "RA", suffix), ...groupOf(parts, "DE", suffix)]);
};

/** Places of the fields that a group takes together, in the order of the table. */
export const placesOf = ({ sign, whole, minutes, seconds }: SexagesimalGroup): number[] =>
  [sign, whole, minutes, seconds].filter((place) => place >= 0).sort((a, b) => a - b);

const DEGREES_PER_HOUR = 15;

/**
 * Degrees from hours or degrees, minutes and seconds. The sign stands for itself, so that −00° stays south. NaN where
 * minutes or seconds reach beyond 60, hours beyond 24 or degrees beyond 90.
 */
export const degreesOf = (
  kind: "RA" | "DE",
  sign: string,
  whole: number,
  minutes: number,
  seconds: number,
): number => {
  const most = kind === "RA" ? 24 : 90;
  if (!(minutes >= 0 && minutes <= 60 && seconds >= 0 && seconds <= 60)) return Number.NaN;
  const size = Math.abs(whole) + minutes / 60 + seconds / 3600;
  const isSouth = kind === "DE" && (sign === "-" || whole < 0 || Object.is(whole, -0));
  if (size > most || (kind === "RA" && (whole < 0 || size === most))) return Number.NaN;
  const degrees = kind === "RA" ? size * DEGREES_PER_HOUR : size;
  return isSouth ? -degrees : degrees;
};
