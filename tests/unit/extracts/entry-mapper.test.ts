import { describe, expect, test } from "vitest";
import { GIVEN } from "#server/catalogue/adopt.ts";
import { LineBuffer } from "#server/database/line-buffer.ts";
import { EntryMapper } from "#server/extracts/entry-mapper.ts";
import type { ColumnValues } from "#server/formats/table.ts";
import { type ReadingPlan, readingPlan } from "#shared/api/extracts.ts";

type Card = readonly [means: string, unit?: string, more?: object];

const planOf = (cards: readonly Card[], answers: Partial<ReadingPlan> = {}): ReadingPlan =>
  readingPlan.parse({
    format: "votable",
    delimiter: ",",
    encoding: "utf-8",
    decimalMark: ".",
    columns: cards.map(([means, unit = "", more = {}], index) => ({
      index,
      header: means,
      means,
      unit,
      blankMarks: [],
      ...more,
    })),
    epoch: null,
    release: "",
    raUnit: null,
    ...answers,
  });

/** One row under the plan: its values by name, or why it is refused. */
const mapped = (plan: ReadingPlan, cells: readonly (string | number)[]) => {
  const mapper = new EntryMapper(plan);
  const columns: ColumnValues[] = cells.map((cell) =>
    typeof cell === "string" ? [cell] : Float64Array.of(cell),
  );
  mapper.read(columns, 1);
  const trouble = mapper.troubleOf(0);
  if (trouble !== null) return { trouble };
  const lines = new LineBuffer();
  mapper.write(0, lines);
  lines.endRow();
  const values = mapper.valuesOf(0);
  return {
    ...Object.fromEntries(GIVEN.flatMap((key, i) => (values[i] === null ? [] : [[key, values[i]]]))),
    line: lines.view().toString().trimEnd(),
    health: mapper.health(),
  } as Record<string, unknown>;
};

const PLACE: readonly Card[] = [["designation"], ["ra", "deg"], ["dec", "deg"]];

describe("cells under a plan", () => {
  test("what is written is what the values are, texts as they stand where nothing was converted", () => {
    const found = mapped(planOf([...PLACE, ["parallax", "arcsec"], ["ks_mag", "mag"]]), [
      "A\tB",
      "10.50",
      "-5",
      "0.06",
      8.25,
    ]);
    expect(found).toMatchObject({ designation: "A\tB", ra: 10.5, dec: -5, parallax: 60, ks_mag: 8.25 });
    expect(found.line).toBe("A\\tB\t10.50\t-5\t60\t8.25");
  });

  test("marks for no value go before the unit's conversion, however the number is written", () => {
    const plan = planOf([...PLACE, ["parallax", "arcsec", { blankMarks: ["-999"] }]]);
    for (const mark of ["-999", "-999.00", " -999 ", -999]) {
      const found = mapped(plan, ["A", "1", "2", mark]);
      expect(found.parallax).toBeUndefined();
      expect(found.line).toBe("A\t1\t2\t\\N");
    }
    expect(mapped(plan, ["A", "1", "2", "-998"]).parallax).toBe(-998_000);
  });

  test("a limit, a footnote or an error behind a number leaves its cell blank and is counted; a word refuses the row", () => {
    const plan = planOf([...PLACE, ["teff", "K"]]);
    for (const text of ["<5000", "~7", "12.3a", "1.2±0.1", "5800:"]) {
      const found = mapped(plan, ["A", "1", "2", text]);
      expect(found).not.toHaveProperty("teff_given");
      expect((found.health as { blanks: object[] }[])[3]?.blanks).toEqual([{ mark: text, count: 1 }]);
    }
    expect(mapped(plan, ["A", "1", "2", "fifty"]).trouble).toBe("“fifty” in teff is not a number.");
    expect(mapped(plan, ["A", "12.3a", "2", "5000"]).trouble).toBe("“12.3a” in ra is not a number.");
  });

  test("errors of exactly zero are none, and ones below it refuse the row", () => {
    const plan = planOf([...PLACE, ["parallax_err", "mas"]]);
    expect(mapped(plan, ["A", "1", "2", "0.000"])).not.toHaveProperty("parallax_err");
    expect(mapped(plan, ["A", "1", "2", "-0.1"]).trouble).toContain("below zero");
  });

  test("half a position, one beyond a pole and a row of nothing are refused", () => {
    const plan = planOf(PLACE);
    expect(mapped(plan, ["A", "1", ""]).trouble).toBe("Only one of RA and Dec is given.");
    expect(mapped(plan, ["A", "1", "90.5"]).trouble).toContain("beyond a pole");
    expect(mapped(plan, ["A", "360", "5"]).trouble).toContain("outside 0 to 360");
    expect(mapped(plan, ["", "", ""]).trouble).toBe("Nothing in this row names or places a star.");
    expect(mapped(plan, ["A", "", ""])).toMatchObject({ designation: "A" });
  });

  test("hours are hours whether written as decimals or in sixtieths", () => {
    const plan = planOf([["designation"], ["ra", ""], ["dec", "deg"]], { raUnit: "hour" });
    expect(mapped(plan, ["A", "1.5", "-00 12 14.966"])).toMatchObject({ ra: 22.5 });
    expect(mapped(plan, ["A", "01:30:00", "-00 12 14.966"]).dec).toBeCloseTo(-0.204_157_2, 7);
    expect(mapped(plan, ["A", "11:59:60.00", "0"]).ra).toBe(180);
  });

  test("the plan's epoch and release stand in where the file has none, the epoch for rows with a position", () => {
    const plan = planOf([...PLACE, ["epoch", "yr"], ["source_id"]], { epoch: 2016, release: "third" });
    expect(mapped(plan, ["A", "1", "2", "", "77"])).toMatchObject({ epoch: 2016, release: "third" });
    expect(mapped(plan, ["A", "1", "2", "2000.5", "77"]).epoch).toBe(2000.5);
    expect(mapped(plan, ["A", "", "", "", "77"])).not.toHaveProperty("epoch");
    expect(mapped(plan, ["A", "", "", "", "77"]).line).toBe("A\t\\N\t\\N\t\\N\t77\tthird");
  });
});

describe("zero points, motions and frames", () => {
  test("AB magnitudes become those on the scale of Vega; one without a known zero point is blank", () => {
    const ab = { magnitudeSystem: "ab" };
    const plan = planOf([...PLACE, ["ks_mag", "mag", ab], ["g_mag", "mag", ab], ["card_mag", "mag", ab]]);
    const found = mapped(plan, ["A", "1", "2", "9.85", "12", "13"]);
    // 1.85 mag in Ks: Blanton & Roweis 2007, AJ 133, 734 (from memory); authors differ by some 0.02 mag.
    expect(Number(found.ks_mag)).toBeCloseTo(8, 1);
    // 25.8010 − 25.6874: Riello et al. 2021, A&A 649, A3.
    expect(found.g_mag).toBeCloseTo(12 - 0.1137, 4);
    expect(found).not.toHaveProperty("card_mag");
  });

  test("a motion without the cosine gets it: 500 mas/yr at +72° is 154.5", () => {
    const cards: Card[] = [...PLACE, ["pmra", "mas.yr-1", { hasCosDec: false }], ["pmra_err", "mas.yr-1"]];
    const found = mapped(planOf(cards), ["A", "1", "72", "500", "10"]);
    // 500 cos 72°, computed.
    expect(found.pmra).toBeCloseTo(154.508_497, 6);
    expect(found.pmra_err).toBeCloseTo(3.090_17, 5);
  });

  test("galactic positions go to the ICRS", () => {
    const found = mapped(planOf(PLACE, { frame: "galactic" }), ["A", "0", "0"]);
    // ESA 1997, SP-1200, vol. 1, eq. 1.5.11: the rotation's first row, as angles 266.40500° and −28.93617°.
    expect(found.ra).toBeCloseTo(266.404_996, 5);
    expect(found.dec).toBeCloseTo(-28.936_174, 5);
  });

  test("positions and motions of an equinox precess together", () => {
    const cards: Card[] = [...PLACE, ["pmra", "mas.yr-1"], ["pmdec", "mas.yr-1"]];
    const plan = planOf(cards, { frame: "FK5", equinox: 1975 });
    const found = mapped(plan, ["A", "41.054063", "49.227750", "300", "-80"]);
    // 25 years of m + n sin α tan δ = 46.12″ + 20.04″ × 0.766, with α and δ of the middle of the time: 0.42691°, computed.
    expect(Number(found.ra) - 41.054_063).toBeCloseTo(0.426_91, 4);
    expect(Math.hypot(Number(found.pmra), Number(found.pmdec))).toBeCloseTo(Math.hypot(300, 80), 8);
    expect(found.pmra).not.toBe(300);
    const same = mapped(planOf(cards, { frame: "FK5", equinox: 2000 }), ["A", "41", "49", "300", "-80"]);
    expect(same).toMatchObject({ ra: 41, dec: 49, pmra: 300, pmdec: -80 });
  });
});
