/** A cell as its column's data type has it; null for a text that is none of that type. Blanks are NaN and the empty text. */
export type NumberCell = (text: string) => number | null;
export type TextCell = (text: string) => string | null;

const WHOLE = /^[+-]?\d+$/;
const REAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const WORD = /^([+-]?)(nan|inf|infinity)$/i;

/** `nan`, `inf` and `infinity` in any case, as C, Python and JavaScript write them; null for any other word. */
const wordValue = (text: string): number | null => {
  const parts = WORD.exec(text);
  if (!parts) return null;
  if (parts[2]?.toLowerCase() === "nan") return Number.NaN;
  return parts[1] === "-" ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
};

const whole =
  (least: number, most: number): NumberCell =>
  (text) => {
    if (text === "") return Number.NaN;
    const value = WHOLE.test(text) ? Number(text) : Number.NaN;
    return value >= least && value <= most ? value : null;
  };

const float64: NumberCell = (text) => {
  if (REAL.test(text)) return Number(text);
  return text === "" ? Number.NaN : wordValue(text);
};

/** Half precision keeps 11 binary digits down to 2^−14 and steps of 2^−24 below, and ends at 65 504. */
const toHalf = (value: number): number => {
  const size = Math.abs(value);
  if (!Number.isFinite(value) || size === 0) return value;
  const step = 2 ** Math.max(Math.floor(Math.log2(size)) - 10, -24);
  const steps = size / step;
  const below = Math.floor(steps);
  const isUp = steps - below > 0.5 || (steps - below === 0.5 && below % 2 === 1);
  const rounded = (isUp ? below + 1 : below) * step;
  return Math.sign(value) * (rounded > 65_504 ? Number.POSITIVE_INFINITY : rounded);
};

const float16: NumberCell = (text) => {
  const value = float64(text);
  return value === null ? null : toHalf(value);
};

const float32: NumberCell = (text) => {
  const value = float64(text);
  return value === null ? null : Math.fround(value);
};

const NUMBER_CELLS: Readonly<Record<string, NumberCell>> = {
  int8: whole(-128, 127),
  int16: whole(-32_768, 32_767),
  int32: whole(-2_147_483_648, 2_147_483_647),
  uint8: whole(0, 255),
  uint16: whole(0, 65_535),
  uint32: whole(0, 4_294_967_295),
  float16,
  float32,
  float64,
  float128: float64,
};

const longWhole =
  (least: bigint, most: bigint): TextCell =>
  (text) => {
    if (text === "") return "";
    if (!WHOLE.test(text)) return null;
    const value = BigInt(text.replace("+", ""));
    return value >= least && value <= most ? String(value) : null;
  };

const BOOLEANS: ReadonlyMap<string, string> = new Map([
  ["", ""],
  ["true", "true"],
  ["false", "false"],
  ["1", "true"],
  ["0", "false"],
]);

const TEXT_CELLS: Readonly<Record<string, TextCell>> = {
  int64: longWhole(-(2n ** 63n), 2n ** 63n - 1n),
  uint64: longWhole(0n, 2n ** 64n - 1n),
  bool: (text) => BOOLEANS.get(text.toLowerCase()) ?? null,
};

/** Reader of the cells of a column of numbers; undefined for data types whose values are kept as text. */
export const numberCell = (datatype: string): NumberCell | undefined => NUMBER_CELLS[datatype];

export const textCell = (datatype: string): TextCell => TEXT_CELLS[datatype] ?? ((text) => text);
