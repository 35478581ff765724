import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { ROOT } from "#scripts/lib/root.ts";
import { astrometryExtract, type ExtractRange, spectraExtract } from "#server/demo/extract-files.ts";
import { inventedStar } from "#server/demo/invented-star.ts";
import { Random } from "#server/demo/random.ts";
import { campaignBody, cardBody } from "#shared/api/instruments.ts";
import { meritBody } from "#shared/api/merits.ts";
import { selectionBody } from "#shared/api/selections.ts";

const file = (name: string): string => readFileSync(join(ROOT, "data-demo", name), "utf8");
const made = (layout: (range: ExtractRange) => Iterable<string>, range: ExtractRange): string =>
  `${[...layout(range)].join("\n")}\n`;

/** First difference as a line, for a message that can be read. */
const firstDifference = (one: string, other: string): string | null => {
  if (one === other) return null;
  const [a, b] = [one.split("\n"), other.split("\n")];
  const at = a.findIndex((line, i) => line !== b[i]);
  return `line ${at + 1}: ${a[at]} | ${b[at]}`;
};

describe("the demo's extracts", () => {
  test.each([
    ["astrometry.csv", astrometryExtract, { seed: 2027, from: 0, to: 13_000 }],
    ["spectra.csv", spectraExtract, { seed: 2027, from: 7_000, to: 20_000 }],
  ] as const)("%s is made again to the last byte", (name, layout, range) => {
    expect(firstDifference(file(name), made(layout, range))).toBeNull();
  });

  test("are small enough to keep", () => {
    for (const name of ["astrometry.csv", "spectra.csv"])
      expect(Buffer.byteLength(file(name))).toBeLessThan(2_000_000);
  });

  test("hold the blemishes that they are there for", () => {
    const lines = file("astrometry.csv").split("\n").slice(1, -1);
    const cells = lines.map((line) => line.split(","));
    const parallax = (row: string[]) => row[5] ?? "";
    expect(cells.some((row) => parallax(row) === "")).toBe(true);
    expect(cells.some((row) => Number(parallax(row)) < 0)).toBe(true);
    expect(cells.some((row) => row.includes("-999"))).toBe(true);
    expect(new Set(cells.map((row) => row.length)).size).toBe(3);
    expect(new Set(lines).size).toBeLessThan(lines.length);
    expect(file("spectra.csv")).toMatch(/^\uFEFFSource;/);
    expect(file("spectra.csv")).toContain(";99,99;");
  });

  test("name every star by 19 digits of its own, the same in both", () => {
    const ids = new Set<string>();
    for (let index = 0; index < 20_000; index++) ids.add(inventedStar(2027, index).sourceId);
    expect(ids.size).toBe(20_000);
    expect([...ids].filter((id) => !/^[1-9]\d{18}$/.test(id))).toEqual([]);
    const shared = inventedStar(2027, 7_000).sourceId;
    expect(file("astrometry.csv")).toContain(shared);
    expect(file("spectra.csv")).toContain(shared);
  });
});

describe("the generator", () => {
  test("gives other skies for other seeds, and overlapping ranges the same stars", () => {
    const line = (seed: number, from: number, at: number) =>
      [...astrometryExtract({ seed, from, to: from + 10 })][1 + at];
    expect(line(1, 0, 5)).toBe(line(1, 5, 0));
    expect(line(1, 0, 5)).not.toBe(line(2, 0, 5));
  });

  test("draws evenly and normally", () => {
    const random = new Random(7, 1);
    const n = 20_000;
    const even = Array.from({ length: n }, () => random.uniform());
    const normal = Array.from({ length: n }, () => random.normal(3, 2));
    const mean = (values: number[]) => values.reduce((a, b) => a + b, 0) / n;
    const spread = (values: number[]) => {
      const middle = mean(values);
      return Math.sqrt(mean(values.map((value) => (value - middle) ** 2)));
    };
    expect(Math.min(...even)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...even)).toBeLessThan(1);
    // Four times the error of the mean of that many draws.
    expect(Math.abs(mean(even) - 0.5)).toBeLessThan((4 * Math.sqrt(1 / 12)) / Math.sqrt(n));
    expect(Math.abs(mean(normal) - 3)).toBeLessThan((4 * 2) / Math.sqrt(n));
    expect(Math.abs(spread(normal) - 2)).toBeLessThan((4 * 2) / Math.sqrt(2 * n));
  });

  test("makes stars that the sky could hold", () => {
    for (let index = 0; index < 500; index++) {
      const star = inventedStar(5, index);
      expect(star.ra).toBeGreaterThanOrEqual(0);
      expect(star.ra).toBeLessThan(360);
      expect(Math.abs(star.dec)).toBeLessThanOrEqual(90);
      expect(star.teff).toBeGreaterThan(2_300);
      expect(star.teff).toBeLessThan(7_200);
      expect(star.bp).toBeGreaterThan(star.rp);
      expect(star.cardMag).toBeLessThan(star.rp);
      expect(star.lightShare).toBeLessThanOrEqual(1);
      for (const value of Object.values(star)) if (typeof value === "number") expect(value).not.toBeNaN();
    }
  });
});

test("cards, campaigns, selections and the figure of merit of the demo are ones a person could save", () => {
  for (const name of ["practice-30.json", "heron-04.json"])
    expect(cardBody.safeParse(JSON.parse(file(name))).error).toBeUndefined();
  for (const name of ["practice-180d.json", "sixty-nights.json"])
    expect(campaignBody.safeParse(JSON.parse(file(name))).error).toBeUndefined();
  expect(meritBody.safeParse(JSON.parse(file("small-suns-warm-rocks.json"))).error).toBeUndefined();
  expect(selectionBody.array().safeParse(JSON.parse(file("selections.json"))).error).toBeUndefined();
});
