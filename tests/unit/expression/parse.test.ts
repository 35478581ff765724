import { describe, expect, test } from "vitest";
import { parseCondition, parseNumber } from "#shared/expression/parse.ts";

const refusal = (text: string) => {
  const parsed = parseCondition(text);
  if (parsed.ok) throw new Error(`${text} was taken.`);
  return parsed;
};

describe("a condition is taken", () => {
  test.each([
    ["2600 <= teff < 3900", ["teff"]],
    ["teff < 3900 and ruwe < 1.4", ["teff", "ruwe"]],
    ["not (abs(dec) > 30) or parallax / parallax_err >= 10", ["dec", "parallax", "parallax_err"]],
    ["g_mag + 5 * log10(parallax) - 10 < 12", ["g_mag", "parallax"]],
    ["(teff > 3900 ? 0.7 : radius) <= 0.7", ["teff", "radius"]],
    ["bp_mag - rp_mag > 1.5", ["bp_mag", "rp_mag"]],
    ["(teff / 5772)^4 * radius^2 > luminosity", ["teff", "radius", "luminosity"]],
    ["min(radius, 1) <\n 0.5", ["radius"]],
  ])("%s", (text, columns) => {
    expect(parseCondition(text)).toMatchObject({ ok: true, columns });
  });
});

describe("a refusal says where and what to do", () => {
  test.each([
    ["tef < 3900", /no column tef/, /teff/, 0],
    ["ruwe < 1.4 and Teff < 3900", /no column Teff/, /teff/, 15],
    ["squrt(teff) > 1", /no function squrt/, /sqrt/, 0],
    ["teff < ", /ends before/, /missing/, 7],
    ["teff < 3900)", /from “\)”/, /bracket/, 11],
    ["0,35 < ruwe", /cannot be read/, /point for decimals/, 1],
    ["teff = 3900", /single =/, /==/, 5],
    ["ruwe < 1.4 && teff < 3900", /cannot be read/, /Write and/, null],
    ["teff", /a number; a cut asks/, /Compare/, null],
    ["teff < 3900 and ruwe", /needs conditions/, /ruwe < 1.4/, null],
    ["2 teff > 5", /side by side/, /\*/, null],
    ["parallax > 5 mas", /no column mas/, /./, 13],
    ["min(teff) > 3", /takes 2 to 10 values, not 1/, /./, 0],
    ["designation == 3", /no column designation/, /./, 0],
    ["", /Nothing/, /teff/, 0],
    ["1e400 < teff", /too large/, /./, null],
    ["teff % 2 == 0", /% is not used/, /./, 5],
  ])("%s", (text, message, hint, position) => {
    const refused = refusal(text);
    expect(refused.message).toMatch(message);
    expect(refused.hint).toMatch(hint);
    if (position !== null) expect(refused.position).toBe(position);
  });

  test.each([
    "teff.constructor > 1",
    "f(x) = 3",
    "[teff, 1] == 1",
    '"a" == teff',
    "teff; ruwe",
    "import(teff) > 1",
    "evaluate(teff) > 1",
    "teff! > 1",
    "true",
    "{a: 1}.a > 1",
    "toString > 1",
    "__proto__ > 1",
    "constructor(1) > 1",
  ])("nothing outside the closed lists gets through: %s", (text) => {
    expect(refusal(text).message).toBeTruthy();
  });

  test("texts that would grow without bound are refused, quickly", () => {
    const within = (open: string, inner: string, close: string, n: number): string =>
      `${open.repeat(n)}${inner}${close.repeat(n)} > 1`;
    for (const text of [
      within("sqrt(", "radius", ")", 99),
      within("-", "radius", "", 900),
      within("min(1, ", "sqrt(radius)", ")", 60),
      `${"(radius > 1 ? 1 : 0) > 1 ? ".repeat(20)}1 ${": 0".repeat(20)} > 1`,
    ])
      expect(refusal(text.slice(0, 1000)).message).toBeTruthy();
  });
});

describe("units", () => {
  test.each([
    "bp_mag + 3 * ruwe > 1",
    "teff > radius",
    "g_mag - parallax > 1",
    "parallax < distance",
    "min(teff, mass) > 1",
  ])("that differ are neither added nor compared: %s", (text) => {
    expect(refusal(text).message).toMatch(/has no meaning/);
  });

  test("a number is not a condition and a condition no number", () => {
    expect(parseNumber("r_min")).toMatchObject({ ok: true, columns: ["r_min"] });
    expect(parseNumber("r_min < 1")).toMatchObject({ ok: false });
    expect(parseNumber("ruwe < 1.4 ? 1 : 0")).toMatchObject({ ok: true });
  });
});
