import { describe, expect, test } from "vitest";
import { Random } from "#server/demo/random.ts";
import { AppError } from "#server/errors.ts";
import { openFits } from "#server/formats/fits/open-fits.ts";
import {
  asciiFile,
  binaryFile,
  bytesOf,
  card,
  extension,
  image,
  pieces,
  primary,
  readFits,
} from "./fits-file.ts";

const { uint8, int16, int32, int64, float32, float64, text, hex } = bytesOf;

const randomFrom = (seed: number): ((below: number) => number) => {
  const random = new Random(seed);
  return (below) => Math.floor(random.between(0, below));
};

const ROWS = 60;
/** Of the binary table. */
const ROW_BYTES = 60;
const cells = (write: (row: number) => Buffer): Buffer[] =>
  Array.from({ length: ROWS }, (_, row) => write(row));

const binary = binaryFile(
  [
    { name: "ok", form: "L", cells: cells((row) => text(row % 2 ? "T" : "F", 1)) },
    { name: "flags", form: "12X", cells: cells((row) => int16(row * 16)) },
    { name: "b", form: "B", keywords: { TNULL: 7 }, cells: cells((row) => uint8(row)) },
    { name: "i", form: "I", keywords: { TZERO: 32768 }, cells: cells((row) => int16(row)) },
    { name: "j", form: "J", keywords: { TSCAL: 0.1 }, cells: cells((row) => int32(row)) },
    {
      name: "id",
      form: "K",
      keywords: { TUNIT: "" },
      cells: cells((row) => int64(4472832130942575872n + BigInt(row))),
    },
    { name: "name", form: "8A", cells: cells((row) => text(`star ${row}`, 8)) },
    { name: "e", form: "E", keywords: { TUNIT: "mag" }, cells: cells((row) => float32(row / 7)) },
    { name: "d", form: "D", cells: cells((row) => float64(row / 7)) },
    { name: "array", form: "1PE(3)", cells: cells(() => hex("0000000300000000")) },
    { name: "z", form: "C", cells: cells(() => hex("00".repeat(8))) },
    { name: "three", form: "3I", cells: cells(() => hex("00".repeat(6))) },
  ],
  { heap: Buffer.alloc(40, 1), cards: [card("EXTNAME", "stars"), "COMMENT Invented.", "HISTORY Made."] },
);

const ascii = asciiFile(
  [
    { name: "name", form: "A8", from: 1 },
    { name: "n", form: "I6", from: 9, keywords: { TNULL: "5" } },
    { name: "id", form: "I20", from: 15 },
    { name: "v", form: "F8.3", from: 36 },
    { name: "e", form: "E12.5", from: 45 },
  ],
  Array.from({ length: ROWS }, (_, row) =>
    [
      `star ${row}`.padEnd(8),
      String(row).padStart(6),
      String(4472832130942575872n + BigInt(row)).padStart(20),
      (row / 7).toFixed(3).padStart(9),
      (row / 7).toExponential(5).padStart(13),
    ].join(""),
  ),
);

const several = Buffer.concat([
  primary(),
  image(3000),
  binary.subarray(2880),
  extension({ columns: [{ name: "a", form: "J" }], rows: [], counts: { NAXIS1: 4 } }),
  extension({ columns: [{ name: "a", form: "J" }], rows: [int32(1), int32(2)] }),
]);

const FILES = { binary, ascii, several };

/** Counts that headers hold when something went wrong with them. */
const COUNTS = [
  "-1",
  "0",
  "1",
  "3",
  "59",
  "61",
  "999",
  "1000",
  "65536",
  "2147483648",
  "1E300",
  "9007199254740993",
  "T",
  "''",
];
const FORMS = [
  "'D'",
  "'0A'",
  "'9999999D'",
  "'PA'",
  "'X'",
  "'Q'",
  "'A0'",
  "'F1.9'",
  "'I4194304'",
  "'A4194304'",
  "'4000000A'",
];

type Damage = (bytes: Buffer, random: (below: number) => number) => Buffer;

/** Places of the records that hold one of the keywords. */
const recordsOf = (bytes: Buffer, keyword: RegExp): number[] => {
  const places: number[] = [];
  for (let at = 0; at < bytes.length; at += 80)
    if (keyword.test(bytes.toString("latin1", at, at + 10))) places.push(at);
  return places;
};

const setValue =
  (keyword: RegExp, values: readonly string[]): Damage =>
  (bytes, random) => {
    const places = recordsOf(bytes, keyword);
    const at = places[random(places.length)] ?? 0;
    const changed = Buffer.from(bytes);
    changed.write((values[random(values.length)] ?? "").padEnd(70), at + 10, "latin1");
    return changed;
  };

const DAMAGES: Record<string, Damage> = {
  cut: (bytes, random) => bytes.subarray(0, random(bytes.length)),
  flip: (bytes, random) => {
    const changed = Buffer.from(bytes);
    const at = random(bytes.length);
    changed[at] = (changed[at] ?? 0) ^ (1 << random(8));
    return changed;
  },
  "several bytes": (bytes, random) => {
    const changed = Buffer.from(bytes);
    for (let count = random(200); count >= 0; count--) changed[random(bytes.length)] = random(256);
    return changed;
  },
  insert: (bytes, random) => {
    const at = random(bytes.length);
    const more = Buffer.alloc(1 + random(3000), random(256));
    return Buffer.concat([bytes.subarray(0, at), more, bytes.subarray(at)]);
  },
  remove: (bytes, random) => {
    const at = random(bytes.length);
    return Buffer.concat([bytes.subarray(0, at), bytes.subarray(at + 1 + random(3000))]);
  },
  "blocks out of order": (bytes, random) => {
    const at = 2880 * random(bytes.length / 2880);
    const to = 2880 * random(bytes.length / 2880);
    const changed = Buffer.from(bytes);
    bytes.copy(changed, to, at, at + 2880);
    return changed;
  },
  "a record lost": (bytes, random) => {
    const at = 80 * random(bytes.length / 80);
    const changed = Buffer.from(bytes);
    changed.fill(32, at, at + 80);
    return changed;
  },
  "a wrong count": setValue(/^(BITPIX|NAXIS.?|PCOUNT|GCOUNT|TFIELDS|TBCOL.+) *=/, COUNTS),
  "a wrong form": setValue(/^TFORM.+=/, FORMS),
  "a wrong mark or scale": setValue(/^T(NULL|SCAL|ZERO|UNIT).+=/, [...COUNTS, "'x'", "1E-400", "NaN"]),
};

interface Outcome {
  error: unknown;
  rows: number;
}

/** Reads to the end, and holds each batch to its header. */
const readDamaged = async (bytes: Buffer): Promise<Outcome> => {
  let rows = 0;
  try {
    const reader = await openFits(pieces(bytes, 3001));
    for await (const batch of reader.batches) {
      rows += batch.rows + batch.refused.length;
      expect(batch.columns).toHaveLength(reader.header.columns.length);
      // What a batch takes must not grow with what a header promises.
      expect(batch.rows * batch.columns.length * 8).toBeLessThan(2 ** 24);
      for (const column of batch.columns) expect(column).toHaveLength(batch.rows);
    }
    expect(rows).toBe(reader.header.declaredRows);
    reader.findings();
    return { error: null, rows };
  } catch (error) {
    return { error, rows };
  }
};

describe("a damaged file", () => {
  const seed = Number(process.env.DAMAGE_SEED ?? 20160101);

  test.each(Object.keys(DAMAGES))(
    `is read to the end or refused in words: %s (seed ${seed})`,
    async (name) => {
      const random = randomFrom(seed);
      for (let round = 0; round < 300; round++) {
        const files = Object.entries(FILES);
        const [kind, file] = files[round % files.length] ?? ["", Buffer.alloc(0)];
        const bytes = DAMAGES[name]?.(file, random) ?? file;
        const { error } = await readDamaged(bytes);
        if (error === null) continue;
        expect(error, `${kind}, round ${round}, seed ${seed}`).toBeInstanceOf(AppError);
        expect((error as AppError).hint).toBeTruthy();
      }
    },
    30_000,
  );

  test.each(Object.entries(FILES))("gives all of its rows or none when it is cut: %s", async (_, file) => {
    const whole = await readFits(file);
    for (let end = 0; end < file.length; end += 97) {
      const read = await readFits(file.subarray(0, end)).catch((error: unknown) => error);
      if (read instanceof AppError) continue;
      expect(read).toMatchObject({ cells: whole.cells });
    }
  });

  test("is wrong in one row alone when one byte of a row is", async () => {
    const random = randomFrom(seed);
    const { cells: whole } = await readFits(binary);
    const from = binary.length - 2880 * Math.ceil((ROWS * ROW_BYTES + 40) / 2880);
    for (let round = 0; round < 200; round++) {
      const row = random(ROWS);
      const changed = Buffer.from(binary);
      changed[from + row * ROW_BYTES + random(ROW_BYTES)] = random(256);
      const { cells: read } = await readFits(changed);
      const others = (columns: typeof whole) => columns.map((column) => column.filter((_, at) => at !== row));
      expect(others(read)).toEqual(others(whole));
    }
  });
});
