import fc from "fast-check";
import { expect, test } from "vitest";
import { encodeRow } from "#server/database/bulk.ts";
import { LineBuffer } from "#server/database/line-buffer.ts";

type Cell = string | number | null;

const write = (lines: LineBuffer, row: readonly Cell[]): void => {
  for (const cell of row) {
    if (cell === null) lines.blank();
    else if (typeof cell === "number") lines.number(cell);
    else lines.text(cell);
  }
  lines.endRow();
};

const cells = fc.array(
  fc.oneof(
    fc.double(),
    fc.integer(),
    fc.constant(null),
    fc.string({ unit: "binary" }),
    fc.constantFrom("a\tb", "c\\d\n", "\0é\r", "−5"),
  ),
  { minLength: 1, maxLength: 8 },
);

test("bytes are those of the rows as lines of text, whatever stands in the cells", () => {
  const lines = new LineBuffer();
  fc.assert(
    fc.property(fc.array(cells, { maxLength: 5 }), (rows) => {
      lines.clear();
      for (const row of rows) write(lines, row);
      expect(lines.view().toString()).toBe(
        Buffer.from(rows.map((row) => `${encodeRow(row)}\n`).join("")).toString(),
      );
      expect(lines.rows).toBe(rows.length);
    }),
  );
});

test("a row that is taken back leaves nothing behind, and long texts make the buffer grow", () => {
  const lines = new LineBuffer();
  write(lines, ["one", 1]);
  const { length } = lines;
  lines.text("x".repeat(3_000_000));
  lines.rewind(length);
  write(lines, ["two", 10.5]);
  expect(lines.view().toString()).toBe("one\t1\ntwo\t10.5\n");
});
