import { describe, expect, test } from "vitest";
import { namedColumn, sampleOf } from "#server/extracts/sample.ts";
import { suggestColumns } from "#server/extracts/suggest.ts";
import type { TableColumn } from "#server/formats/table.ts";
import { HEADERS } from "./headers.ts";

const columnOf = (spec: string): TableColumn => {
  const [name = "", unit = "", ucd = "", description = ""] = spec.split("|");
  return { ...namedColumn(name), unit, ucd, description };
};

const suggest = async (specs: readonly string[], ...rows: string[][]) => {
  const records = rows.map((cells, i) => ({ cells, line: i + 2, text: cells.join(",") }));
  return suggestColumns(sampleOf(specs.map(columnOf), records));
};

const TEXTS = new Set(["designation"]);
const CASES = Object.entries(HEADERS).flatMap(([means, specs]) => specs.map((spec) => ({ means, spec })));

describe("headers in use", () => {
  test("are understood in more than nine of ten cases, and never taken for something else", async () => {
    const wrong: string[] = [];
    const mistaken: string[] = [];
    for (const { means, spec } of CASES) {
      const cell = TEXTS.has(means) ? "LH 12" : "12.5";
      const [found] = await suggest([spec], [cell], [cell]);
      if (found?.means === means) continue;
      wrong.push(`${spec}: ${found?.means} instead of ${means}`);
      if (found?.means !== "kept") mistaken.push(`${spec}: ${found?.means}`);
    }
    expect(CASES.length).toBeGreaterThanOrEqual(150);
    expect(mistaken).toEqual([]);
    expect(wrong.length, wrong.join("\n")).toBeLessThan(CASES.length * 0.05);
  });

  test("each say why", async () => {
    for (const { spec } of CASES) {
      const [found] = await suggest([spec], ["12.5"]);
      expect(found?.because).toMatch(/\w.*\.$/);
    }
  });
});

describe("a suggestion", () => {
  test("follows the file's word for its main column, whatever the spellings", async () => {
    const found = await suggest(["ra|deg|pos.eq.ra", "alpha|deg|pos.eq.ra;meta.main"], ["30", "31"]);
    expect(found.map((c) => c.means)).toEqual(["kept", "ra"]);
    expect(found[0]?.because).toContain("“alpha” gives RA already");
  });

  test("leaves a column unused whose UCD speaks against its name", async () => {
    const [found] = await suggest(["parallax|K|phys.temperature.effective"], ["5000"]);
    expect(found).toMatchObject({ means: "kept" });
    expect(found?.because).toContain("says something else");
  });

  test("leaves a column unused whose texts are no numbers", async () => {
    const [found] = await suggest(["par"], ["upper"], ["lower"]);
    expect(found?.means).toBe("kept");
    expect(found?.because).toContain("no numbers");
  });

  test("takes the unit from the file, then from the header, then the usual one, and says which", async () => {
    const found = await suggest(
      ["Plx|arcsec", "e_Plx [mas]", "Teff", "dist|furlong"],
      ["0.1", "1", "5000", "20"],
    );
    expect(found.map((c) => [c.unit, c.asks])).toEqual([
      ["arcsec", false],
      ["mas", false],
      ["K", false],
      ["furlong", true],
    ]);
    expect(found[0]?.because).toContain("the file says arcsec");
    expect(found[1]?.because).toContain("names the unit");
    expect(found[2]?.because).toContain("K is the usual unit");
  });
});

describe("the zero point of magnitudes", () => {
  test.each([
    ["phot_g_mean_mag", "vega"],
    ["Gmag", "vega"],
    ["Vmag", "vega"],
    ["ks_m", "vega"],
    ["2MASS_K", "vega"],
    ["ks_mag", "vega"],
    ["Ksmag|mag(AB)", "ab"],
    ["Ksmag|ABmag", "ab"],
    ["Ksmag|mag||Ks magnitude (AB)", "ab"],
    ["Jmag|mag||Vega magnitude in J", "vega"],
    ["Ksmag", null],
    ["J", null],
  ])("of %s is %s", async (spec, system) => {
    const [found] = await suggest([spec], ["12.5"]);
    expect(found).toMatchObject({ magnitudeSystem: system, unit: "mag" });
  });
});

describe("the motion in right ascension", () => {
  test.each([
    ["pmra", true],
    ["pmRA*", true],
    ["pmRAcosDE", true],
    ["pmRA|mas/yr||Proper motion in RA*cos(DE)", true],
    ["pmRA|mas/yr||Proper motion in RA, not multiplied by cos(Dec)", false],
    ["pmRA", null],
    ["mu_alpha", null],
  ])("of %s has the cosine: %s", async (spec, hasCosDec) => {
    const [found] = await suggest([spec], ["12.5"]);
    expect(found).toMatchObject({ means: "pmra", hasCosDec });
  });
});
