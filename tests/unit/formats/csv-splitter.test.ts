import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { CsvSplitter } from "#server/formats/csv-splitter.ts";

const split = (text: string, pieces = [text.length], delimiter = ",") => {
  const splitter = new CsvSplitter(delimiter);
  const records = [];
  let from = 0;
  for (const size of [...pieces, text.length]) {
    records.push(...splitter.push(text.slice(from, from + size)));
    from += size;
  }
  const { record, isQuoteOpen } = splitter.end();
  return { records: record ? [...records, record] : records, isQuoteOpen };
};

describe("splitting text into records", () => {
  test("gives the same cells as a parser that looks at each character, however the text arrives", () => {
    const cell = fc.string({ unit: fc.constantFrom("a", "7", " ", '"', ",", "\n", "é"), maxLength: 6 });
    const table = fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 8 });
    fc.assert(
      fc.property(table, fc.array(fc.integer({ min: 1, max: 9 }), { maxLength: 20 }), (rows, pieces) => {
        const text = rows.map((r) => r.map((c) => `"${c.replaceAll('"', '""')}"`).join(",")).join("\n");
        const expected = parse(text, { relax_column_count: true }) as string[][];
        expect(split(text, pieces).records.map((r) => r.cells)).toEqual(expected);
      }),
    );
  });

  test("counts lines of the file, also inside quotes", () => {
    const { records } = split('a,b\n"one\ntwo",2\n3,4\r\n\n5,"6 ""six"""');
    expect(records.map((r) => [r.line, r.cells])).toEqual([
      [1, ["a", "b"]],
      [2, ["one\ntwo", "2"]],
      [4, ["3", "4"]],
      [5, [""]],
      [6, ["5", '6 "six"']],
    ]);
  });

  test("takes a quote inside a cell for itself", () => {
    expect(split("5' 3\" tall,b\nc,d\n").records.map((r) => r.cells)).toEqual([
      ["5' 3\" tall", "b"],
      ["c", "d"],
    ]);
  });

  test("tells when the file ends inside a quote", () => {
    expect(split('a,b\n1,"2').isQuoteOpen).toBe(true);
    expect(split("a,b\n1,2").isQuoteOpen).toBe(false);
  });

  test("gives up on a quote that swallows the file, naming its line", () => {
    const splitter = new CsvSplitter(",");
    splitter.push("a,b\n");
    expect(() => splitter.push(`1,"${"x\n".repeat(2_100_000)}`)).toThrow(
      /Line 2 .* opens a quote that is not closed/,
    );
  });
});
