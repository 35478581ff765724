import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { expect, test } from "vitest";
import { csvLine } from "#server/handover/csv.ts";

const cellOf = (text: string, isIdentifier?: true): string => {
  const [[cell] = []] = parse(csvLine([text, "end"], [{ isIdentifier }])) as string[][];
  return cell ?? "";
};

test.each([
  "-12.5",
  "+12 34 56.7",
  "-00:12:14.97",
  "-00 12 14.966",
  "-.5",
  "+1e-5",
  "-00d12m14.9s",
  "SL 100001",
])("leaves %s alone", (text) => {
  expect(cellOf(text)).toBe(text);
});

test.each(["=1+1", "@x", "-2+3+cmd", "+SUM(A1)", "-cmd|' /C calc'!A0", "\t=1", "\r=1", '=HYPERLINK("x")'])(
  "keeps a spreadsheet from running %j",
  (text) => {
    expect(cellOf(text)).toBe(`'${text}`);
  },
);

test("leaves an identifier alone that begins with a sign, but not one that could run", () => {
  expect(cellOf("-AB12", true)).toBe("-AB12");
  expect(cellOf("-AB12")).toBe("'-AB12");
  expect(cellOf("=1+1", true)).toBe("'=1+1");
  expect(cellOf("-2+3+cmd", true)).toBe("'-2+3+cmd");
});

test("writes numbers to the last bit with a plain minus, and blanks empty", () => {
  expect(csvLine([0.1 + 0.2, -1e-7, -0, 1e21, null, ""])).toBe("0.30000000000000004,-1e-7,0,1e+21,,\r\n");
});

test("any text comes back as it was, line breaks and quotes too", () => {
  const harmless = fc.string({ unit: "binary" }).filter((text) => !/^[=+\-@\t\r\ufeff]/.test(text));
  fc.assert(
    fc.property(fc.array(harmless, { minLength: 2, maxLength: 6 }), (texts) => {
      const cells = ["first", ...texts];
      expect(parse(csvLine(cells), { record_delimiter: "\r\n" })).toEqual([cells]);
    }),
  );
});

test.each(["a\nb", "a\rb", "a\r\nb", 'a"b', "a,b"])("puts %j in quotes", (text) => {
  expect(csvLine([text])).toBe(`"${text.replaceAll('"', '""')}"\r\n`);
});
