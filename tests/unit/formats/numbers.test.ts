import { describe, expect, test } from "vitest";
import { detectDialect } from "#server/formats/dialect.ts";
import { detectEncoding, notATable } from "#server/formats/encoding.ts";
import { isBlankWord, parseNumber, parseSexagesimal } from "#server/formats/numbers.ts";

describe("numbers", () => {
  test.each([
    ["12.5", 12.5],
    ["\u22120.3", -0.3],
    ["\u20131", -1],
    ["\u20142.5e3", -2500],
    ["1.2D-3", 0.0012],
    [".5", 0.5],
    ["+5", 5],
    ["1e5", 1e5],
    ["3.", 3],
  ])("%s is read", (text, value) => expect(parseNumber(text, ".")).toBe(value));

  test.each(["12.3a", "<0.5", "~7", "1.2±0.1", "1,000.5", "0x10", "Infinity", "1 000", "", "1e"])(
    "%s is not taken for a number",
    (text) => expect(parseNumber(text, ".")).toBeNaN(),
  );

  test("a decimal comma is one where the plan says so, and a point then is not", () => {
    expect(parseNumber("12,5", ",")).toBe(12.5);
    expect(parseNumber("\u221212,5", ",")).toBe(-12.5);
    expect(parseNumber("1.012,5", ",")).toBeNaN();
    expect(parseNumber("12.5", ",")).toBeNaN();
    expect(parseNumber("12,5", ".")).toBeNaN();
  });

  test("words for no value are blanks", () => {
    for (const text of ["", "NaN", "null", "None", "--", "---", "INDEF", "\\N"])
      expect(isBlankWord(text), text).toBe(true);
    expect(isBlankWord("0")).toBe(false);
  });
});

describe("sexagesimal", () => {
  test("keeps the sign of minus zero and carries sixty seconds", () => {
    expect(parseSexagesimal("-00 12 14.966")).toBeCloseTo(-0.2041572, 7);
    expect(parseSexagesimal("\u221200:12:14.966")).toBeCloseTo(-0.2041572, 7);
    expect(parseSexagesimal("11:59:60.00")).toBe(12);
    expect(parseSexagesimal("14h29m42.0s")).toBeCloseTo(14.495, 12);
  });

  test("does not read mixed marks or sixty-one", () => {
    expect(parseSexagesimal("00:61:00")).toBeNaN();
    expect(parseSexagesimal("12.5")).toBeNaN();
  });
});

describe("what a file is", () => {
  test.each([
    ["a,b\n1.5,2\n", ",", "."],
    ["a;b\n1,5;2,25\n", ";", ","],
    ["a\tb\n1,5\t2,25\n", "\t", ","],
    ["a|b\n1.5|2\n", "|", "."],
    ["a;b\n1.5;2\n", ";", "."],
  ])("%j has its delimiter and its decimal mark", (text, delimiter, decimalMark) =>
    expect(detectDialect(text)).toEqual({ delimiter, decimalMark }),
  );

  test("its encoding is told by its mark, else by its bytes", () => {
    expect(detectEncoding(Buffer.from("\ufeffa,b")).encoding).toBe("utf-8");
    expect(detectEncoding(Buffer.from("é,b")).encoding).toBe("utf-8");
    expect(detectEncoding(Buffer.from("\ufeffa", "utf16le")).encoding).toBe("utf-16le");
    expect(detectEncoding(Buffer.from("é,b", "latin1"))).toMatchObject({ encoding: "latin1", isGuess: true });
  });

  test("a table by its name alone is known for what it is", () => {
    expect(notATable(Buffer.from("<?xml version='1.0'?>"), "utf-8")).toContain("VOTable");
    expect(notATable(Buffer.from("SIMPLE  =   T"), "utf-8")).toBe("a FITS file");
    expect(notATable(Buffer.from("a,b\n\u00001"), "utf-8")).toBe("a binary file");
    expect(notATable(Buffer.from("a,b\n1,2\n"), "utf-8")).toBeNull();
  });
});
