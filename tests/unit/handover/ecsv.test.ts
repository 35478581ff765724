import { expect, test } from "vitest";
import { ecsvHeader, ecsvLine } from "#server/handover/ecsv.ts";
import { type FileColumn, listColumns } from "#server/handover/list-columns.ts";

const column = (more: Partial<FileColumn>): FileColumn => ({
  name: "x",
  datatype: "float64",
  unit: "",
  ucd: "",
  description: "A number",
  value: () => null,
  ...more,
});

test("the header says what each column is and what the file is", () => {
  const header = ecsvHeader(
    [
      column({ name: "pmra", unit: "mas.yr-1", ucd: "pos.pm;pos.eq.ra" }),
      column({ name: "logg", unit: "dex(cm.s-2)" }),
      column({ name: "name", datatype: "string", description: 'Said "so"' }),
    ],
    { target_list: 'A "list"\nof two', stars: 2, cuts: ["teff < 3900", "ruwe < 1.4"], none: [] },
  );
  expect(header).toBe(`# %ECSV 1.0
# ---
# delimiter: ','
# datatype:
# - {name: pmra, unit: "mas yr-1", datatype: float64, description: "A number", meta: {ucd: "pos.pm;pos.eq.ra"}}
# - {name: logg, unit: "dex(cm s-2)", datatype: float64, description: "A number"}
# - {name: name, datatype: string, description: "Said \\"so\\""}
# meta: !!omap
# - target_list: "A \\"list\\"\\nof two"
# - stars: 2
# - cuts:
#   - "teff < 3900"
#   - "ruwe < 1.4"
# - none: []
# schema: astropy-2.0
pmra,logg,name
`);
});

test("no sign of a name ends a line of the header", () => {
  const header = ecsvHeader([column({})], { target_list: "a\u0085b\u2028c\r\nd\u007f" });
  expect(
    header.split(/[\n\r\u0085\u2028\u2029]/).filter((line) => line !== "" && !line.startsWith("#")),
  ).toEqual(["x"]);
  expect(header).toContain("a\\u0085b\\u2028c\\r\\nd\\u007f");
});

test("a row keeps every digit, doubles quotes, leaves blanks empty and has no line break inside", () => {
  expect(ecsvLine([1, 0.1 + 0.2, null, 'a "b"', "", "3141592653589793239", "two\r\nlines"])).toBe(
    '1,0.30000000000000004,,"a ""b""","",3141592653589793239,"two lines"\n',
  );
});

test("names of columns are different, whatever the terms are called", () => {
  for (const isInvented of [true, false]) {
    const names = listColumns(["Reach", "reach", "届く", ""], isInvented).map((c) => c.name);
    expect(new Set(names).size).toBe(names.length);
    for (const name of names) expect(name).toMatch(/^[a-z][a-z0-9_]*$/);
    expect(names.includes("sky")).toBe(isInvented);
  }
});
