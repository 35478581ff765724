import { describe, expect, test } from "vitest";
import type { Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { readingPlan } from "#shared/api/extracts.ts";
import { answered } from "#shared/catalogue/answers.ts";

const card = (index: number, header: string, means: string) => ({
  index,
  header,
  means,
  unit: "",
  blankMarks: [],
});

const plan: ReadingPlan = readingPlan.parse({
  delimiter: ",",
  encoding: "utf-8",
  decimalMark: ".",
  columns: [card(0, "a", "pmra"), card(1, "d", "pmdec"), card(2, "Ks", "ks_mag")],
  epoch: null,
  release: "",
  raUnit: null,
});

const ask = (code: string, column: string | null = null, values: string[] = ["accept"]): Finding => ({
  level: "ask",
  code,
  column,
  message: "",
  hint: "",
  count: 1,
  examples: [],
  answers: values.map((value) => ({ value, label: value })),
});

describe("an answer", () => {
  test("about a mark goes to its column, and the opposite answer takes it back", () => {
    const finding = ask("blank-mark", "Ks");
    const blank = answered(plan, finding, "blank:-999:0");
    expect(blank.columns[2]).toMatchObject({ blankMarks: ["-999:0"], keptNumbers: [] });
    expect(answered(blank, finding, "number:-999:0").columns[2]).toMatchObject({
      blankMarks: [],
      keptNumbers: ["-999:0"],
    });
  });

  test.each<[string, Partial<ReadingPlan>]>([
    ["hour", { raUnit: "hour" }],
    ["deg", { raUnit: "deg" }],
    ["frame:FK5/1950", { frame: "FK5", equinox: 1950 }],
    ["frame:galactic", { frame: "galactic", equinox: null }],
    ["date:2000", { epoch: 2000, frame: "ICRS", accepted: ["x"] }],
    ["axes:2000", { epoch: null, frame: "FK5", equinox: 2000, accepted: ["x"] }],
    ["both:2000", { epoch: 2000, frame: "FK5", equinox: 2000, accepted: ["x"] }],
    ["accept", { accepted: ["x"] }],
  ])("%s is about the whole plan", (value, expected) =>
    expect(answered(plan, ask("x"), value)).toMatchObject(expected),
  );

  test.each<[string, object]>([
    ["unit:arcsec", { unit: "arcsec" }],
    ["ab", { magnitudeSystem: "ab" }],
    ["without-cos", { hasCosDec: false }],
    ["means:kept", { means: "kept" }],
  ])("%s is about the column alone", (value, expected) => {
    const after = answered(plan, ask("x", "Ks"), value);
    expect(after.columns[2]).toMatchObject(expected);
    expect(after.columns.slice(0, 2)).toEqual(plan.columns.slice(0, 2));
  });

  test("that is typed is the year or the unit itself", () => {
    expect(answered(plan, ask("epoch-missing", null, []), "2016")).toMatchObject({ epoch: 2016 });
    expect(answered(plan, ask("unit-unknown", "a", []), "mas/yr").columns[0]?.unit).toBe("mas/yr");
  });

  test("can make the motions change places", () =>
    expect(answered(plan, ask("motions-swapped"), "swap").columns.map((c) => c.means)).toEqual([
      "pmdec",
      "pmra",
      "ks_mag",
    ]));

  test("that nobody offers changes nothing", () => {
    for (const value of ["", "constructor", "toString:x", "frame:FK4/1950"])
      expect(answered(plan, ask("x", "Ks"), value)).toEqual(plan);
  });
});
