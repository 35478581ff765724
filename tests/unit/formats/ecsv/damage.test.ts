import { describe, expect, test } from "vitest";
import { Random } from "#server/demo/random.ts";
import { AppError } from "#server/errors.ts";
import { ecsv, type ReadTable, readEcsv } from "./support.ts";

const ROWS = Array.from({ length: 40 }, (_, i) => [
  String(3141592653589793239n + BigInt(i)),
  i / 7,
  `n "${i}"`,
]);

const TEXT = ecsv(
  [
    "{name: id, datatype: int64}",
    "{name: plx, unit: mas, datatype: float64, description: Parallax}",
    "name: name\n#   datatype: string\n#   meta: !!omap\n#   - {ucd: meta.id}",
  ],
  `id,plx,name\n${ROWS.map(([id, plx, name]) => `${id},${plx},"${String(name).replaceAll('"', '""')}"\n`).join("")}`,
  ["delimiter: ','"],
);
const WHOLE = Buffer.from(TEXT);
const BODY = TEXT.indexOf("\nid,plx,name\n") + 1;

/** What the reader makes of damaged bytes; an error that a person can read counts as an answer. */
const answer = async (bytes: Uint8Array): Promise<ReadTable | AppError> => {
  try {
    return await readEcsv(bytes, 997);
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
};

const isOriginal = (row: ReadTable["rows"][number]): boolean =>
  ROWS.some((original) => original.every((value, i) => value === row[i]));

const place = (random: Random, from: number, to: number): number => Math.floor(random.between(from, to));

type Damage = (random: Random) => Uint8Array;

const DAMAGES: readonly (readonly [string, Damage])[] = [
  [
    "a byte turned into another",
    (random) => {
      const bytes = Buffer.from(WHOLE);
      bytes[place(random, 0, bytes.length)] = place(random, 0, 256);
      return bytes;
    },
  ],
  [
    "a piece lost",
    (random) => {
      const from = place(random, 0, WHOLE.length);
      return Buffer.concat([WHOLE.subarray(0, from), WHOLE.subarray(from + place(random, 1, 60))]);
    },
  ],
  [
    "a piece there twice",
    (random) => {
      const from = place(random, 0, WHOLE.length - 60);
      const end = from + place(random, 1, 60);
      return Buffer.concat([WHOLE.subarray(0, end), WHOLE.subarray(from)]);
    },
  ],
  ["the end lost", (random) => WHOLE.subarray(0, place(random, 0, WHOLE.length))],
];

describe.each(DAMAGES)("%s", (_, damage) => {
  test("is an error in words, or every row is of its types and most are those of the file", async () => {
    for (let seed = 1; seed <= 80; seed++) {
      const read = await answer(damage(new Random(seed)));
      if (read instanceof AppError) {
        expect(read.hint, `seed ${seed}`).toBeTruthy();
        continue;
      }
      const kinds = read.header.columns.map((c) => (c.type.startsWith("float") ? "number" : "string"));
      for (const row of read.rows)
        for (const [i, value] of row.entries())
          if (value !== null) expect(typeof value, `seed ${seed}`).toBe(kinds[i]);
      const harmed = read.rows.filter((row) => !isOriginal(row)).length;
      // A header that says something else of a column changes all of its values; in the body damage stays where it is.
      const isHeaderWhole = read.header.columns.map((c) => c.type).join() === "int64,float64,text";
      if (isHeaderWhole) expect(harmed, `seed ${seed}`).toBeLessThanOrEqual(2);
    }
  });
});

test("a changed digit in the body touches its own row alone", async () => {
  const random = new Random(7);
  for (let n = 0; n < 60; n++) {
    const bytes = Buffer.from(WHOLE);
    const at = place(random, BODY + "id,plx,name\n".length, bytes.length);
    if (!/\d/.test(TEXT[at] ?? "")) continue;
    bytes[at] = 48 + ((Number(TEXT[at]) + 1) % 10);
    const read = await answer(bytes);
    expect(read).not.toBeInstanceOf(AppError);
    if (read instanceof AppError) continue;
    expect(read.rows.length + read.refused.length).toBe(ROWS.length);
    // The last digit of a double may change without changing the number.
    expect(read.rows.filter((row) => !isOriginal(row)).length + read.refused.length).toBeLessThanOrEqual(1);
  }
});
