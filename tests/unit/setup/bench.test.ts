import { expect, test } from "vitest";
import { describeMeasurement, ratioOf } from "#tests/bench/harness.ts";
import { readOptions } from "#tests/bench/options.ts";

test("a figure is printed beside its ratio to the plain alternative", () => {
  const measurement = {
    what: "100,000 rows",
    value: 1.5,
    unit: "s" as const,
    plain: { what: "bare LOAD DATA", value: 0.5 },
  };
  expect(ratioOf(measurement)).toBe(3);
  expect(describeMeasurement("import", measurement)).toBe(
    "import         | 100,000 rows | 1.50 s | 3.00 × bare LOAD DATA (0.500 s)",
  );
});

test("options are read, and what is no number of rows is refused", () => {
  expect(readOptions(["--only", "import", "--rows", "1000"])).toEqual({
    only: "import",
    rows: 1000,
    out: undefined,
  });
  expect(() => readOptions(["--rows", "many"])).toThrow(/whole number/);
  expect(() => readOptions(["--row", "5"])).toThrow();
});
