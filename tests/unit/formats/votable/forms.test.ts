import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { Base64Decoder } from "#server/formats/votable/base64.ts";
import { readWhole } from "./support.ts";
import {
  asBinary,
  asBinary2,
  asTabledata,
  DATATYPES,
  type Datatype,
  expectedRows,
  type Value,
  type WrittenTable,
} from "./write.ts";

// The least values stand for blanks in the form without masks.
const text = fc.string({
  unit: fc.constantFrom("a", "7", " ", "&", "<", ">", '"', "\n", "\r", "é", "α", "😀"),
  maxLength: 8,
});
const VALUES: Record<Datatype, fc.Arbitrary<Value>> = {
  boolean: fc.constantFrom("true", "false"),
  unsignedByte: fc.integer({ min: 0, max: 254 }),
  short: fc.integer({ min: -32_767, max: 32_767 }),
  int: fc.integer({ min: -2_147_483_647, max: 2_147_483_647 }),
  long: fc.bigInt({ min: -(2n ** 63n) + 1n, max: 2n ** 63n - 1n }).map(String),
  float: fc.float({ noNaN: true }).map((value) => value + 0),
  double: fc.double({ noNaN: true }).map((value) => value + 0),
  char: text,
  unicodeChar: text,
};

const table: fc.Arbitrary<WrittenTable> = fc
  .array(fc.constantFrom(...DATATYPES), { minLength: 1, maxLength: 12 })
  .chain((datatypes) =>
    fc
      .array(fc.tuple(...datatypes.map((type) => fc.option(VALUES[type], { nil: null }))), { maxLength: 10 })
      .map((rows) => ({ datatypes, rows })),
  );

const pieces = fc.array(fc.integer({ min: 1, max: 90 }), { minLength: 1, maxLength: 12 });

describe("tables of every datatype", { timeout: 60_000 }, () => {
  const forms = { TABLEDATA: asTabledata, BINARY: asBinary, BINARY2: asBinary2 };

  test.each(Object.entries(forms))(
    "come out of %s as they went in, however the bytes arrive",
    async (variant, write) => {
      await fc.assert(
        fc.asyncProperty(table, pieces, async (written, sizes) => {
          const { header, rows, refused, findings } = await readWhole(write(written), sizes);
          expect(header.variant).toBe(variant);
          expect(rows).toEqual(expectedRows(written));
          expect(refused).toEqual([]);
          expect(findings).toEqual([]);
        }),
        { numRuns: 150 },
      );
    },
  );

  test("more rows than a batch holds", async () => {
    const rows = Array.from({ length: 22_000 }, (_, i): Value[] => [i, i % 3 === 0 ? null : `star ${i}`]);
    const written: WrittenTable = { datatypes: ["int", "char"], rows };
    const expected = JSON.stringify(expectedRows(written));
    for (const write of [asTabledata, asBinary, asBinary2]) {
      const { rows: read } = await readWhole(write(written), [10_007]);
      expect(JSON.stringify(read) === expected).toBe(true);
    }
  });
});

describe("base64 in pieces", () => {
  const decode = (parts: readonly string[]): Buffer => {
    const decoder = new Base64Decoder();
    const out = Buffer.alloc(10_000);
    let end = 0;
    for (const part of parts) end = decoder.decode(part, 0, part.length, out, end);
    expect(decoder.stoppedAt).toBe(-1);
    expect(decoder.isWhole).toBe(true);
    return out.subarray(0, end);
  };

  test("is the same bytes wherever it is broken or blank", () => {
    const sizes = fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 1, maxLength: 60 });
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 100 }), sizes, fc.boolean(), (bytes, lengths, isPadded) => {
        const whole = Buffer.from(bytes).toString("base64");
        const rest = isPadded ? whole : whole.replace(/=+$/, "");
        const parts: string[] = [];
        let at = 0;
        for (const length of lengths) {
          parts.push(`${rest.slice(at, at + length)}${length % 3 === 0 ? "\r\n " : ""}`);
          at += length;
        }
        expect(decode([...parts, rest.slice(at)])).toEqual(Buffer.from(bytes));
      }),
    );
  });

  // RFC 4648, section 10.
  test.each([
    ["Zg==", "f"],
    ["Zm8=", "fo"],
    ["Zm9vYmFy", "foobar"],
  ])("%s is %s", (encoded, decoded) => expect(decode([encoded]).toString()).toBe(decoded));
});
