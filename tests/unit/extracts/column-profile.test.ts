import { describe, expect, test } from "vitest";
import { ColumnProfile } from "#server/extracts/column-profile.ts";

const card = { index: 0, header: "Plx", means: "parallax", unit: "mas", blankMarks: ["-999"] };

describe("what a column holds", () => {
  test("small columns are described exactly, with each mark counted", () => {
    const profile = new ColumnProfile(card);
    for (const value of [4, 1, 3, 2]) profile.add(value);
    for (const mark of ["-999", "", "-999"]) profile.addBlank(mark);
    const health = profile.health();
    expect(health).toMatchObject({ header: "Plx", means: "parallax", unit: "mas", rows: 7, values: 4 });
    expect(health).toMatchObject({ low: 1, median: 2.5, high: 4 });
    expect(health.blanks).toEqual([
      { mark: "-999", count: 2 },
      { mark: "", count: 1 },
    ]);
    expect(health.histogram.reduce((sum, n) => sum + n, 0)).toBe(4);
    expect([health.histogram[0], health.histogram.at(-1)]).toEqual([1, 1]);
  });

  test("large ones by a part of their values: the range exactly, the median to a percent, the same every time", () => {
    const describeRamp = () => {
      const profile = new ColumnProfile(card);
      // A full turn through all residues, far from sorted.
      for (let i = 0; i < 200_003; i++) profile.add((i * 7919) % 200_003);
      return profile.health();
    };
    const health = describeRamp();
    expect(health).toMatchObject({ values: 200_003, low: 0, high: 200_002 });
    // The median of 8192 values drawn at random scatters by 1 / (2 √8192) = 0.55 % of the range (computed).
    expect(Math.abs((health.median ?? 0) / 200_003 - 0.5)).toBeLessThan(0.025);
    expect(health.histogram.reduce((sum, n) => sum + n, 0)).toBe(200_003);
    expect(describeRamp()).toEqual(health);
  });

  test("a column of blanks has no range, and one of a single value one bin", () => {
    const blank = new ColumnProfile(card);
    blank.addBlank("");
    expect(blank.health()).toMatchObject({
      rows: 1,
      values: 0,
      low: null,
      median: null,
      high: null,
      histogram: [],
    });
    const flat = new ColumnProfile(card);
    for (let i = 0; i < 3; i++) flat.add(5);
    expect(flat.health()).toMatchObject({ low: 5, median: 5, high: 5 });
    expect(flat.health().histogram.filter((n) => n > 0)).toEqual([3]);
  });

  test("a text for every row takes no more room than a few", () => {
    const profile = new ColumnProfile(card);
    for (let i = 0; i < 5_000; i++) profile.addBlank(`<${i}`);
    const { blanks } = profile.health();
    expect(blanks.length).toBeLessThan(50);
    expect(blanks[0]?.mark).toBe("other texts");
    expect(blanks.reduce((sum, { count }) => sum + count, 0)).toBe(5_000);
  });
});
