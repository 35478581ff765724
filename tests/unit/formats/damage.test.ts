import { gzipSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { Random } from "#server/demo/random.ts";
import { AppError } from "#server/errors.ts";
import { DATA, ONE_FILE, README } from "./described/fixtures.ts";
import { bytesOf, type OpenedAny, openAny } from "./open-any.ts";
import { FILES } from "./same-table.ts";

const SEEDS = 400;

/** What is made of damaged bytes; an error that a person can read counts as an answer. */
const answer = async (bytes: Uint8Array, companion?: Uint8Array): Promise<OpenedAny | AppError> => {
  try {
    return await openAny(bytes, { name: "table1.dat", companion }, 997);
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
};

const place = (random: Random, from: number, to: number): number => Math.floor(random.between(from, to));

type Damage = (bytes: Buffer, random: Random) => Buffer;

const insert = (bytes: Buffer, at: number, more: string): Buffer =>
  Buffer.concat([bytes.subarray(0, at), Buffer.from(more, "latin1"), bytes.subarray(at)]);

const NASTY = [
  '"',
  "\n",
  "\r",
  "\r\n",
  "\u0000",
  "\u00ff",
  ",",
  "|",
  "#",
  " ".repeat(3000),
  "9".repeat(3000),
  "-".repeat(3000),
  "=".repeat(500),
  "\t",
  "\ufeff",
];

const DAMAGES: readonly Damage[] = [
  (bytes, random) => bytes.subarray(0, place(random, 0, bytes.length)),
  (bytes, random) => {
    const damaged = Buffer.from(bytes);
    for (let n = place(random, 1, 6); n > 0; n--)
      damaged[place(random, 0, bytes.length)] = place(random, 0, 256);
    return damaged;
  },
  (bytes, random) => {
    const from = place(random, 0, bytes.length);
    return Buffer.concat([bytes.subarray(0, from), bytes.subarray(from + place(random, 1, 80))]);
  },
  (bytes, random) => {
    const from = place(random, 0, bytes.length);
    return Buffer.concat([bytes.subarray(0, from + place(random, 1, 200)), bytes.subarray(from)]);
  },
  (bytes, random) =>
    insert(bytes, place(random, 0, bytes.length), NASTY[place(random, 0, NASTY.length)] ?? ""),
  (bytes, random) =>
    Buffer.from(
      bytes.toString("latin1").replace(/\n/g, () => ["\n", "\r", "\r\n"][place(random, 0, 3)] ?? ""),
      "latin1",
    ),
];

/** Every batch is whole, and whatever was not read as it should be is told. */
const check = (read: OpenedAny, hint: string): void => {
  const width = read.header.columns.length;
  for (const cells of read.rows)
    if (cells.length !== width) throw new Error(`${hint}: a row of ${cells.length} cells`);
  for (const [at, { type }] of read.header.columns.entries()) {
    const isNumber = /^(?:u?int(?:8|16|32)|float)/.test(type);
    for (const cells of read.rows) {
      const value = cells[at] ?? null;
      if (value !== null && (typeof value === "number") !== isNumber)
        throw new Error(`${hint}: ${type} holds ${value}`);
    }
  }
  for (const { text, why } of read.refused)
    if (text === "" || why === "") throw new Error(`${hint}: a refusal without words`);
};

const files: [string, Buffer, Buffer | undefined][] = [
  ...Object.entries(FILES).map(([name, { bytes }]): [string, Buffer, undefined] => [
    name,
    Buffer.from(bytes()),
    undefined,
  ]),
  ["a description of three notes", Buffer.from(ONE_FILE), undefined],
  ["data with a description beside them", Buffer.from(DATA), Buffer.from(README)],
  [
    "names in bars",
    Buffer.from("\\n=2\n|  ra  | name|\n|double| char|\n  1.5    a\n  2.5    b\n"),
    undefined,
  ],
  [
    "columns below a ruled line",
    Buffer.from("== ==== =====\na  name v\n== ==== =====\n1  ab c 2.5\n2       3.5\n"),
    undefined,
  ],
];

describe.each(files)("%s, damaged", (_, whole, companion) => {
  test("is an error in words or a table of its types before the test runs out of time", {
    timeout: 60_000,
  }, async () => {
    for (let seed = 1; seed <= SEEDS; seed++) {
      const random = new Random(seed);
      const damage = DAMAGES[seed % DAMAGES.length] ?? DAMAGES[0];
      const damaged = damage?.(whole, random) ?? whole;
      const read = await answer(seed % 5 === 0 ? gzipSync(damaged) : damaged, companion);
      const hint = `seed ${seed}`;
      if (read instanceof AppError) expect(read.hint, `${hint}: ${read.message}`).toBeTruthy();
      else check(read, hint);
    }
  });

  test("packed and then damaged, is an error in words or as it was", { timeout: 60_000 }, async () => {
    const packed = gzipSync(whole);
    const intact = JSON.stringify((await answer(packed, companion)) as OpenedAny);
    for (let seed = 1; seed <= 60; seed++) {
      const damage = DAMAGES[seed % 4] ?? DAMAGES[0];
      const read = await answer(damage?.(packed, new Random(seed)) ?? packed, companion);
      if (read instanceof AppError) expect(read.hint, `seed ${seed}`).toBeTruthy();
      // The header of a member names a time and a system, which change nothing.
      else
        expect(JSON.stringify({ ...read, bytes: 0 }), `seed ${seed}`).toBe(
          JSON.stringify({ ...JSON.parse(intact), bytes: 0 }),
        );
    }
  });
});

const STARS = Array.from({ length: 60 }, (_, i) => [
  `LH-${String(i).padStart(4, "0")}`,
  (i * 6.1).toFixed(3),
  (7 + i / 9).toFixed(2),
]);
const aligned = STARS.map(
  ([name = "", ra = "", V = ""]) => `${name} ${ra.padStart(7)} ${V.padStart(5)}`,
).join("\n");
const RULE = "-".repeat(80);

test.each([
  ["text with commas", "name,ra,V\n", `${STARS.map((cells) => cells.join(",")).join("\n")}\n`],
  ["text in columns", "name         ra     V\n", `${aligned.replaceAll(" ", "  ")}\n`],
  [
    "a described table",
    `Byte-by-byte Description of file: t\n${RULE}\n 1- 7 A7 --- name Name\n 9-15 F7.3 deg ra RA\n17-21 F5.2 mag V V\n${RULE}\n`,
    `${aligned}\n`,
  ],
])("a byte changed in the rows of %s touches no others", { timeout: 60_000 }, async (_, head, body) => {
  const isOriginal = (cells: OpenedAny["rows"][number]): boolean =>
    STARS.some((star) =>
      star.every((cell, i) =>
        i === 0 ? cell === cells[i] : Number(cell) === Number(cells[i] ?? Number.NaN),
      ),
    );
  for (let seed = 1; seed <= 400; seed++) {
    const random = new Random(seed);
    const bytes = Buffer.from(head + body);
    bytes[place(random, head.length, bytes.length)] = place(random, 32, 127);
    const read = await answer(bytes);
    // A line that is longer than described ends the reading.
    if (read instanceof AppError) continue;
    const harmed = read.rows.filter((cells) => !isOriginal(cells)).length;
    expect(harmed + read.refused.length, `seed ${seed}`).toBeLessThanOrEqual(2);
    // Two rows whose line end was lost are one that is refused.
    expect(read.rows.length + read.refused.length, `seed ${seed}`).toBeGreaterThanOrEqual(STARS.length - 1);
  }
});

test("a description that is damaged is an error in words or describes a table", {
  timeout: 60_000,
}, async () => {
  for (let seed = 1; seed <= 300; seed++) {
    const damage = DAMAGES[seed % DAMAGES.length] ?? DAMAGES[0];
    const read = await answer(Buffer.from(DATA), damage?.(Buffer.from(README), new Random(seed)));
    if (read instanceof AppError) expect(read.hint, `seed ${seed}: ${read.message}`).toBeTruthy();
    else check(read, `seed ${seed}`);
  }
});

/** So long that a time which grows with the square of it would not end within the time of a test. */
const LONG = 600_000;
test.each([
  ["blanks", " ".repeat(LONG)],
  ["dashes", "-".repeat(LONG)],
  ["equals signs and a letter", `${"=".repeat(LONG)}x`],
  ["bars", "|".repeat(LONG)],
  ["bars and blanks", "| ".repeat(LONG / 2)],
  ["digits", `${"1".repeat(LONG)}x`],
  ["commas", ",".repeat(LONG)],
  ["quotes", '"'.repeat(LONG)],
  ["marks of comments", "#".repeat(LONG)],
  ["comments", "# x\n".repeat(LONG / 4)],
  ["line ends", "\r".repeat(LONG)],
  ["words between blanks", "ab ".repeat(LONG / 3)],
  ["notes", "Note ".repeat(LONG / 5)],
  ["heads of descriptions", "Byte-by-byte Description of file: a\n".repeat(20_000)],
  ["columns of a description", `Byte-by-byte Description of file: a\n${"1 A1 --- a b\n".repeat(20_000)}`],
  [
    "stars in names of files",
    `Byte-by-byte Description of file: ${"*a".repeat(1000)} b c\n  1-2 I2 --- a b\n`,
  ],
])("a file of nothing but %s comes to an end", { timeout: 60_000 }, async (_, content) => {
  for (const text of [content, `a b\n1 2\n${content}`, `a,b\n1,2\n3,${content}\n4,5\n`]) {
    const read = await openAny(bytesOf(text), { name: `${"a".repeat(100)}.dat` }, 65_536).catch(
      (error: unknown) => error,
    );
    if (read instanceof Error) expect(read).toBeInstanceOf(AppError);
  }
});
