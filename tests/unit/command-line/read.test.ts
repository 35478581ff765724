import { gzipSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { DATA, ONE_FILE, README } from "../formats/described/fixtures.ts";
import { readEcsv } from "../formats/ecsv/support.ts";
import { ownFolder, run } from "./support.ts";

const { folder, put } = ownFolder();

const report = async (...args: string[]): Promise<Record<string, unknown>> => {
  const { code, out, err } = await run(folder, "read", ...args);
  expect([code, err]).toEqual([0, ""]);
  return JSON.parse(out) as Record<string, unknown>;
};

describe("read", () => {
  test("says what the file was taken for, its columns, rows and findings", async () => {
    const file = put(
      "stars.csv",
      gzipSync("#rows=4\nid;ra;V\n;deg;mag\n3141592653589793239;1,5;7\n2;2,5\n3;3,5;8"),
    );
    expect(await report(file)).toEqual({
      file,
      takenFor: "text with delimiters (semicolons)",
      format: "delimited",
      variant: "semicolons",
      encoding: "utf-8",
      isPacked: true,
      decimalMark: ",",
      meta: { title: null, description: null, sources: ["rows=4"], frame: null },
      columns: [
        ["id", ""],
        ["ra", "deg"],
        ["V", "mag"],
      ].map(([name, unit]) => ({
        name,
        type: "text",
        unit,
        ucd: "",
        description: "",
        nullMark: null,
        frame: null,
      })),
      declaredRows: 4,
      rows: 2,
      refusedRows: 1,
      refused: [
        { row: 2, line: 5, text: "2;2,5", why: expect.stringContaining("2 values; the table has 3 columns") },
      ],
      findings: [
        expect.objectContaining({ key: "units-line" }),
        expect.objectContaining({ key: "open-end" }),
        expect.objectContaining({ key: "fewer-rows", level: "stop", examples: ["4 declared, 3 found"] }),
      ],
    });
  });

  test.each([["--rows"], ["--format", "ecsv"]])("writes the values as ECSV with %s", async (...option) => {
    const { code, out, err } = await run(folder, "read", put("table.txt", ONE_FILE), ...option);
    expect(code).toBe(0);
    expect(err).toMatch(/^4 rows read, 0 refused; taken for text with a byte-by-byte description/);
    const { header, rows } = await readEcsv(out);
    expect(header.meta.title).toBe("Red dwarfs of an invented sky");
    expect(header.columns).toMatchObject([
      { name: "Name", type: "text" },
      { name: "Flag", type: "int32" },
      { name: "RAdeg", type: "float64", unit: "deg", description: expect.stringContaining("RAh, RAm, RAs") },
      { name: "DEdeg" },
      { name: "[Fe/H]", unit: "[-]" },
      { name: "logg" },
      { name: "plx", unit: "mas" },
      { name: "ID", type: "int64" },
    ]);
    expect(rows[0]?.slice(4)).toEqual([-0.12, 4.812, 3.14, "314159265358979323"]);
    expect(rows[1]?.slice(4)).toEqual([null, null, null, null]);
  });

  test("names that mean something in YAML or between commas come through", async () => {
    const { out } = await run(
      folder,
      "read",
      put("odd.csv", '"a, b",no,ra: x,RA: X,#\n1,2,"x ""y""",4,5\n'),
      "--rows",
    );
    const { header, rows } = await readEcsv(out);
    expect(header.columns.map((c) => c.name)).toEqual(["a, b", "no", "ra: x", "RA: X (2)", "#"]);
    expect(rows).toEqual([["1", "2", 'x "y"', "4", "5"]]);
  });

  test("takes the description from a file of its own, and asks which table it is", async () => {
    const [data, readme] = [put("table1.dat", DATA), put("ReadMe", README)];
    expect(await report(data, "--companion", readme)).toMatchObject({
      format: "described",
      declaredRows: 4,
      rows: 4,
    });
    const other = put("stars.dat", DATA);
    const asked = await run(folder, "read", other, "--companion", readme);
    expect([asked.code, asked.out]).toEqual([2, ""]);
    expect(asked.err).toMatch(
      /speaks of 2 tables, table1\.dat, refs\.dat.*\n {2}Say which of them the file is with --table/,
    );
    expect(await report(other, "--companion", readme, "--table", "table1.dat")).toMatchObject({ rows: 4 });
  });

  test("a plan settles delimiter, decimal mark and encoding", async () => {
    const file = put("plan.csv", Buffer.from("a,é;b\n1,5;2\n", "latin1"));
    const plan = put("plan.json", JSON.stringify({ delimiter: ";", decimalMark: ",", encoding: "latin1" }));
    expect(await report(file, "--plan", plan)).toMatchObject({
      encoding: "latin1",
      decimalMark: ",",
      columns: [{ name: "a,é" }, { name: "b" }],
      findings: [],
    });
  });

  test.each([
    ["a file that is not there", ["nothing.csv"], 1, /nothing\.csv cannot be read: it does not exist/],
    ["a folder", ["."], 1, /cannot be read: it is a folder/],
    ["no file", [], 2, /The file to read is missing/],
    ["another format", ["x.csv", "--format", "csv"], 2, /--format is “csv”/],
    ["rows as a report", ["x.csv", "--rows", "--format", "json"], 2, /--rows writes ECSV/],
    ["a web page", [put("page.csv", "<!doctype html><html></html>")], 1, /This is a web page/],
    ["a file that ends in the middle", [put("cut.csv", "a,b\n1,2\n3")], 1, /ends in the middle of line 3/],
    [
      "a file that ends in the middle, its rows",
      [put("cut2.csv", "a,b\n1,2\n3"), "--rows"],
      1,
      /ends in the middle/,
    ],
  ])("%s ends it with nothing on the standard output", async (_, args, code, words) => {
    const ended = await run(folder, "read", ...args);
    expect([ended.code, ended.out]).toEqual([code, ""]);
    expect(ended.err).toMatch(words);
  });
});
