import type { Field } from "./fields.ts";

const INTEGER = /^([+-]?)0*(\d+)(?:\.0*)?$/;
const HEXADECIMAL = /^0[xX]([0-9A-Fa-f]{1,16})$/;

const LEAST_LONG = -(2n ** 63n);
const GREATEST_LONG = 2n ** 63n - 1n;

/** A whole number in its shortest digits, from decimal or 0x-hexadecimal text; null for anything else or out of 64 bits. */
export const longText = (text: string): string | null => {
  const hexadecimal = HEXADECIMAL.exec(text);
  const decimal = INTEGER.exec(text);
  if (!hexadecimal && (!decimal || decimal[2] === undefined || decimal[2].length > 19)) return null;
  const size = BigInt(hexadecimal ? text : (decimal?.[2] ?? ""));
  const value = decimal?.[1] === "-" ? -size : size;
  return value < LEAST_LONG || value > GREATEST_LONG ? null : value.toString();
};

/** A number from 0x-hexadecimal text; NaN for anything else. */
export const hexadecimalNumber = (text: string): number =>
  HEXADECIMAL.test(text) ? Number(text) : Number.NaN;

/**
 * The declared mark of a blank as a number, so that "-99.0" also stands for -99.000; NaN where there is none or the
 * column holds no numbers.
 */
export const nullNumber = (field: Field): number => {
  const mark = field.nullMark?.trim() ?? "";
  if (mark === "") return Number.NaN;
  const value = Number(mark);
  return field.type === "float32" ? Math.fround(value) : value;
};

/** The declared mark of a blank as cells of the column spell it; null where there is none. */
export const nullText = (field: Field): string | null => {
  const mark = field.nullMark?.trim() ?? "";
  if (mark === "") return null;
  return field.type === "int64" ? (longText(mark) ?? mark) : mark;
};
