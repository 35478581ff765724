import fc from "fast-check";
import { expect, test } from "vitest";
import { ecsvHeader, ecsvLine } from "#server/handover/ecsv.ts";
import { readEcsv } from "./support.ts";

const COLUMNS = [
  { name: "designation", datatype: "string", unit: "", ucd: "meta.id", description: 'A "name": [x]' },
  { name: "pmra", datatype: "float64", unit: "mas.yr-1", ucd: "pos.pm;pos.eq.ra", description: "Motion" },
  { name: "place", datatype: "int64", unit: "", ucd: "meta.number", description: "# place" },
] as const;

/** Texts as the format can hold them: without line ends, blanks at their ends, or nothing in them. */
const text = fc
  .string({ unit: "grapheme", maxLength: 20 })
  .map((s) => s.replace(/[\p{Cc}\u2028\u2029]/gu, " ").trim())
  .filter((s) => s !== "" && !s.startsWith("#"));
const row = fc.tuple(
  fc.option(text),
  fc.option(fc.double({ noNaN: true }).map((x) => (Object.is(x, -0) ? 0 : x))),
  fc.option(fc.maxSafeInteger()),
);

test("what we write as ECSV reads back to the same values, units, UCDs and descriptions", async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.array(row, { maxLength: 30 }),
      fc.integer({ min: 1, max: 500 }),
      async (rows, piece) => {
        const body = rows.map((cells) => ecsvLine(cells)).join("");
        const { header, ...read } = await readEcsv(
          ecsvHeader(COLUMNS, { title: "T: \u00e9", n: 3 }) + body,
          piece,
        );
        expect(
          header.columns.map(({ name, unit, ucd, description }) => [name, unit, ucd, description]),
        ).toEqual(
          COLUMNS.map(({ name, unit, ucd, description }) => [name, unit.replace(".", " "), ucd, description]),
        );
        expect(header.meta.title).toBe("T: \u00e9");
        // 64-bit whole numbers come back as texts.
        expect(read.rows).toEqual(rows.map(([a, b, c]) => [a, b, c === null ? null : String(c)]));
        expect(read.refused).toEqual([]);
      },
    ),
    { numRuns: 60 },
  );
});
