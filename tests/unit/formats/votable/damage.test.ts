import { describe, expect, test } from "vitest";
import { AppError } from "#server/errors.ts";
import { chance, readWhole } from "./support.ts";
import { asBinary, asBinary2, asTabledata, type Value, type WrittenTable } from "./write.ts";

const MUTATIONS = 1_200;
/** Set VOTABLE_DAMAGE_SEED to see a failure again. */
const SEED = Number(process.env.VOTABLE_DAMAGE_SEED ?? Date.now() % 1_000_000);

const TABLE: WrittenTable = {
  datatypes: ["long", "double", "float", "int", "short", "unsignedByte", "boolean", "char", "unicodeChar"],
  rows: Array.from({ length: 30 }, (_, i): Value[] => [
    `${4_472_832_130_942_575_872n + BigInt(i)}`,
    i / 7,
    i % 5 === 0 ? null : i / 4,
    i,
    -i,
    i % 4 === 0 ? null : i,
    i % 2 === 0 ? "true" : "false",
    `star ${i} & more`,
    "α Cen",
  ]),
};

const INSERTED = [
  "<",
  ">",
  "&",
  "]]>",
  "<!--",
  "-->",
  "<![CDATA[",
  "</TR>",
  "<TR>",
  "<TD>",
  "<TD/>",
  "</TABLEDATA>",
  "</STREAM>",
  "<TABLE>",
  "&amp;",
  "&lol;",
  "&#0;",
  "=",
  "\0",
  "\ufffe",
  "<GROUP>".repeat(70),
  "x".repeat(5_000),
  '<!DOCTYPE a [<!ENTITY b "c">]>',
  "<?xml version='1.0'?>",
  '<FIELD name="x" datatype="long"/>',
  ' arraysize="*"',
  ' arraysize="999999999"',
  ' arraysize="2x*"',
  ' nrows="-1"',
];

type Random = () => number;

const place = (random: Random, bytes: Buffer): number => Math.floor(random() * bytes.length);

const cut = (random: Random, bytes: Buffer): Buffer => bytes.subarray(0, place(random, bytes));

const flip = (random: Random, bytes: Buffer): Buffer => {
  const damaged = Buffer.from(bytes);
  for (let i = 0; i < 1 + random() * 4; i++) {
    const at = place(random, bytes);
    damaged[at] = (damaged[at] ?? 0) ^ (1 << Math.floor(random() * 8));
  }
  return damaged;
};

const insert = (random: Random, bytes: Buffer): Buffer => {
  const at = place(random, bytes);
  const text = INSERTED[Math.floor(random() * INSERTED.length)] ?? "";
  return Buffer.concat([bytes.subarray(0, at), Buffer.from(text), bytes.subarray(at)]);
};

const drop = (random: Random, bytes: Buffer): Buffer => {
  const at = place(random, bytes);
  return Buffer.concat([bytes.subarray(0, at), bytes.subarray(at + random() * 200)]);
};

const repeat = (random: Random, bytes: Buffer): Buffer => {
  const at = place(random, bytes);
  return Buffer.concat([bytes.subarray(0, at), bytes.subarray(at * random())]);
};

const DAMAGES = [cut, flip, insert, drop, repeat];

describe("damaged files", { timeout: 120_000 }, () => {
  const documents = { TABLEDATA: asTabledata(TABLE), BINARY: asBinary(TABLE), BINARY2: asBinary2(TABLE) };

  test.each(Object.entries(documents))(
    "in the form %s are read or refused in words, and never more",
    async (form, text) => {
      const whole = Buffer.from(text);
      let refusals = 0;
      for (let i = 0; i < MUTATIONS; i++) {
        const random = chance(SEED + i);
        const damage = DAMAGES[Math.floor(random() * DAMAGES.length)] ?? cut;
        const damaged = damage(random, whole);
        try {
          await readWhole(damaged, [1 + Math.floor(random() * 3_000)]);
        } catch (error) {
          refusals++;
          if (error instanceof AppError && error.hint && error.message.length < 500) continue;
          const how = `${form}, seed ${SEED + i}, ${damage.name}`;
          throw new Error(`${how}: ${damaged.subarray(0, 2000).toString()}`, { cause: error });
        }
      }
      expect(refusals, `seed ${SEED}`).toBeGreaterThan(MUTATIONS / 4);
    },
  );

  test("cut anywhere before their end are never taken for whole", async () => {
    for (const document of Object.values(documents)) {
      const whole = Buffer.from(document.trimEnd());
      for (let length = 0; length < whole.length; length += 13)
        await expect(readWhole(whole.subarray(0, length)), `cut at ${length}`).rejects.toBeInstanceOf(
          AppError,
        );
    }
  });
});
