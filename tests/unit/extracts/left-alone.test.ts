import { describe, expect, test } from "vitest";
import { findingsFor, lines, sharedValues, tableOf } from "./cases.ts";

const PLACED = "source_id\tra\tdec\tepoch";
const placed = (i: number): (string | number)[] => [1000 + i, 100.5 + i, 20 - i / 10, 2016];

const codes = async (...args: Parameters<typeof findingsFor>): Promise<string[]> =>
  (await findingsFor(...args)).map((f) => f.code);

const stars = (columns: string, count: number, of: (i: number) => readonly (string | number)[]) =>
  tableOf(
    `${PLACED}\t${columns}`,
    lines(count, (i) => [...placed(i), ...of(i)]),
  );

describe("nothing is asked about", () => {
  test("a number that only looks like a mark and lies among the others", async () => {
    const sample = stars("distance|pc", 40, (i) => [i % 4 === 0 ? 99 : 60 + 2 * i]);
    expect(await codes(sample)).toEqual([]);
  });

  test("a largest value that comes often, without a gap to the next", async () => {
    const sample = stars("Teff|K", 40, (i) => [Math.min(4000 + 40 * i, 5000)]);
    expect(await codes(sample)).toEqual([]);
  });

  test("zeros among small whole numbers of a quantity that can be zero", async () => {
    const sample = stars("E(B-V)|mag", 40, (i) => [i % 2 === 0 ? 0 : 0.01 * i]);
    expect(await codes(sample)).toEqual([]);
  });

  test("RA below 24 where Dec spans little", async () => {
    const sample = tableOf(
      `source_id\tra|deg\tdec\tepoch`,
      lines(60, (i) => [i, i / 3, 10 + i / 10, 2016]),
    );
    expect(await codes(sample)).toEqual([]);
  });

  test("marks in unused columns", async () => {
    const sample = stars("colour", 20, (i) => [i % 2 === 0 ? -999 : i]);
    expect(await codes(sample)).toEqual([]);
  });

  test("small parallaxes whose unit is written down", async () => {
    expect(await codes(stars("plx|mas", 30, (i) => [0.1 + i / 100]))).toEqual([]);
  });

  test("shared stars that agree, or differ by as much as measurements do", async () => {
    const sample = stars("plx|mas\tks_m", 8, (i) => [20 + i, 8 + i / 10]);
    const shared = sharedValues({
      parallax: Array.from({ length: 8 }, (_, i) => 20.3 + i),
      ks_mag: Array.from({ length: 8 }, (_, i) => 8.05 + i / 10),
    });
    expect(await codes(sample, {}, shared)).toEqual([]);
  });

  test("a ratio that is no slip of a unit, or that only some stars have", async () => {
    const sample = stars("plx|mas", 10, (i) => [20 + i]);
    const ten = (of: (i: number) => number) =>
      sharedValues({ parallax: Array.from({ length: 10 }, (_, i) => of(i)) });
    expect(
      await codes(
        sample,
        {},
        ten((i) => (20 + i) * 7),
      ),
    ).toEqual([]);
    expect(
      await codes(
        sample,
        {},
        ten((i) => (20 + i) * (i < 4 ? 1 : 1000)),
      ),
    ).toEqual([]);
  });

  test("a delimiter that also stands in some of the cells", async () => {
    const sample = stars("name", 6, (i) => [i % 2 === 0 ? "A, B" : "C"]);
    expect(await codes(sample)).toEqual([]);
  });

  test("decimal commas of which one cannot part thousands", async () => {
    const sample = tableOf(
      `${PLACED}\tTeff`,
      lines(6, (i) => [i, 100, 20, 2016, i === 0 ? "3500,5" : `${i + 3},500`]),
      { decimalMark: "," },
    );
    expect(await codes(sample)).not.toContain("decimal-mark");
  });
});

describe("evidence in a question", () => {
  test("names what the values would mean in radians as well, where they could be", async () => {
    const sample = tableOf(
      PLACED,
      lines(60, (i) => [i, i / 10, 1.5 - i / 20, 2016]),
    );
    const [found] = await findingsFor(sample);
    expect(found).toMatchObject({ code: "ra-unit" });
    expect(found?.answers.map((a) => a.value)).toEqual(["hour", "deg", "unit:rad"]);
  });

  test("tells by absolute magnitudes of parallaxes in arcsec that are read as mas", async () => {
    const sample = stars("plx|mas\tks_m", 20, (i) => [0.06 + i / 1000, 7.9]);
    const found = (await findingsFor(sample)).find((f) => f.code === "unit-slip");
    // M_Ks of 7.9 mag at 0.060 mas: 7.9 + 5 + 5 log10(0.060 / 1000) = −8.2; the middle star has 0.070 mas (computed).
    expect(found?.message).toContain("M = −7.9 in Ks");
    expect(found?.answers.map((a) => a.value)).toEqual(["unit:arcsec", "accept"]);
  });

  test("weighs both conventions of a motion by stars near a pole", async () => {
    const sample = tableOf(
      "source_id\tra\tdec\tepoch\tpmRA|mas/yr\tpmDE|mas/yr",
      lines(6, (i) => [i, 10 * i, 72, 2016, 500, 20]),
    );
    const cosine = Math.cos((72 * Math.PI) / 180);
    const shared = sharedValues({ pmra: Array.from({ length: 6 }, () => 500 * cosine) });
    const found = (await findingsFor(sample, {}, shared)).find((f) => f.code === "cos-dec");
    // 500 − 500 cos 72° = 345 mas/yr, 5.0″ in 14.5 years (computed).
    expect(found?.message).toMatch(/6 shared stars beyond ±60° .* by 350 mas\/yr if it is, and by 0 if/);
  });
});
