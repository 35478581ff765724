import { findColumn } from "#shared/catalogue/columns.ts";
import { cellText, formatCell, withError } from "#shared/format/numbers.ts";

const MINUS = "−";
/** Enough to follow a sum with the eye; the copied text has every digit. */
const DIGITS_TO_READ = 7;
const EVERY_DIGIT = 17;

const superscript = (power: string): string =>
  [...power.replace("+", "")].map((c) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(c)] ?? "⁻").join("");

const spelt = (value: number, digits: number): string => {
  const [mantissa = "", power] = String(Number(value.toPrecision(digits))).split("e");
  const shown = mantissa.replace("-", MINUS);
  if (power === undefined) return shown;
  return `${shown === "1" ? "" : `${shown} × `}10${superscript(power)}`;
};

/** A number to read, to seven digits. */
export const figure = (value: number): string => spelt(value, DIGITS_TO_READ);

/** A number with all its digits. */
export const everyDigit = (value: number): string => spelt(value, EVERY_DIGIT);

/** What people write for the units of the workings, which come in VOUnit spelling. */
const UNITS: Readonly<Record<string, string>> = {
  solRad: "R☉",
  solMass: "M☉",
  solLum: "L☉",
  earthRad: "R⊕",
  AU: "au",
  Angstrom: "Å",
  "dex(cm.s-2)": "dex (cm s⁻²)",
};

/** A unit in VOUnit spelling as a person reads it: `s-1.cm-2.Angstrom-1` is s⁻¹ cm⁻² Å⁻¹. */
export const unitText = (unit: string): string =>
  UNITS[unit] ??
  unit
    .split(".")
    .map((part) => {
      const [, name = part, power = ""] = /^([A-Za-z]+)(-?\d+)$/.exec(part) ?? [];
      return `${UNITS[name] ?? name}${superscript(power)}`;
    })
    .join(" ");

const joined = (number: string, unit: string): string => (unit === "" ? number : `${number} ${unit}`);

/** Unit under which a quantity is shown: that of its column where it has one. */
const shownUnit = (key: string, unit: string): string => {
  const label = findColumn(key)?.unitLabel ?? unitText(unit);
  return label === "–" ? "" : label;
};

/** A value and its error as the table shows them, with the unit. */
export const quantityText = (key: string, unit: string, value: number, error: number | null): string => {
  const column = findColumn(key);
  if (column) return joined(cellText(column, value, error ?? undefined), shownUnit(key, unit));
  return inputText(unit, value, error);
};

/** A value that enters a formula, with its error and unit: nothing is cut off that the sum needs. */
export const inputText = (unit: string, value: number, error: number | null): string => {
  if (error === null || !(error > 0)) return joined(figure(value), unitText(unit));
  const shown = withError(value, error, DIGITS_TO_READ);
  return joined(`${shown.value} ± ${shown.error}`, unitText(unit));
};

/** Bounds of an interval in the unit of the quantity, cut where half its width would cut an error. */
export const boundsText = (key: string, unit: string, bounds: readonly number[], half: number): string[] => {
  const column = findColumn(key);
  return bounds.map((bound) =>
    joined(
      column ? formatCell(column, bound, half).value : withError(bound, half, DIGITS_TO_READ).value,
      shownUnit(key, unit),
    ),
  );
};
