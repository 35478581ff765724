import { describe, expect, test } from "vitest";
import { detectorPrecision } from "#server/command-line/precision-grid.ts";
import { readCard } from "#server/command-line/settings-files.ts";
import type { DetectorCard } from "#shared/science/cards.ts";
import { noiseInOneHour, noiseInTransit } from "#shared/science/noise.ts";
import { ownFolder, run } from "./support.ts";

const { folder, put } = ownFolder();
const HERON = (await readCard(folder, "heron-04")).settings as DetectorCard;
const GRID = [
  "--diameters",
  "0.1,0.2,0.5,1,2",
  "--exposures",
  "60,120,600,1800,1h,6.5h",
  "--magnitude",
  "10",
];

const precision = (...args: string[]) => run(folder, "precision", ...args);

describe("precision", () => {
  test("photons alone, V = 10", async () => {
    const { code, out } = await precision(...GRID);
    expect(code).toBe(0);
    // Computed: 996.20 photons s⁻¹ cm⁻² Å⁻¹ at V = 0, 880 Å, throughput 0.5, ppm = 10⁶ / √N.
    expect(out.slice(out.indexOf("    D"))).toBe(`    D     60 s    120 s   600 s  1800 s     1 h   6.5 h
0.1 m  2200.29  1555.84  695.79  401.72  284.06  111.42
0.2 m  1100.15   777.92  347.90  200.86  142.03   55.71
0.5 m   440.06   311.17  139.16   80.34   56.81   22.28
  1 m   220.03   155.58   69.58   40.17   28.41   11.14
  2 m   110.01    77.79   34.79   20.09   14.20    5.57
`);
    expect(out).toMatch(/880 Å wide; no obstruction; throughput 0\.5/);
    expect((await precision(...GRID, "--photons-only")).out).toBe(out);
  });

  test("as CSV, one line for each cell with every digit", async () => {
    const { out } = await precision(
      "--diameters",
      "0.5",
      "--exposures",
      "60s,30min",
      "--magnitude",
      "10",
      "--format",
      "csv",
    );
    const [names, ...lines] = out.trimEnd().split("\r\n");
    expect(names).toBe("diameter_m,exposure_s,precision_ppm,precision_ppm_blank");
    expect(
      lines.map((line) => line.split(",").map((cell, i) => (i === 2 ? Number(cell).toFixed(2) : cell))),
    ).toEqual([
      ["0.5", "60", "440.06", ""],
      ["0.5", "1800", "80.34", ""],
    ]);
  });

  test("a detector card at its own aperture gives its own noise, and says where it saturates", async () => {
    const of = detectorPrecision(HERON, 12, false);
    expect(of(HERON.apertureM, 3600).ppm).toBeCloseTo(noiseInOneHour(HERON, 12), 9);
    expect(of(HERON.apertureM, 4 * 3600).ppm).toBeCloseTo(noiseInTransit(HERON, 12, 4), 9);
    expect(of(HERON.apertureM, 60).ppm).toBeGreaterThan(of(HERON.apertureM, 600).ppm);
    expect(of(0.5, 3600).ppm).toBeLessThan(of(0.4, 3600).ppm);
    expect(detectorPrecision(HERON, 12, true)(0.4, 3600).ppm).toBeLessThan(of(0.4, 3600).ppm);
    const { out } = await precision(
      "--diameters",
      "0.4,2",
      "--exposures",
      "1h",
      "--magnitude",
      "9.5",
      "--card",
      "heron-04",
    );
    expect(out).toMatch(/ 2 m {2}too bright\n$/);
    expect(out).toMatch(/by the card “Heron 0\.4 m”/);
    expect(detectorPrecision(HERON, 15, false)(0.4, 3600)).toEqual({ ppm: Number.NaN, blank: "too-faint" });
  });

  test("below an hour red noise and floor stay, and a time below an exposure is one shorter exposure", () => {
    const red = { ...HERON, redNoisePpm: 100, floorPpm: 180, faintLimit: 20, brightLimit: 5 };
    const steady = Math.hypot(100, 180);
    const long = detectorPrecision(red, 12, false)(0.4, 3599.999).ppm;
    expect(long).toBeCloseTo(noiseInOneHour(red, 12), 3);
    const white = long ** 2 - steady ** 2;
    const short = detectorPrecision(red, 12, false)(0.4, 60).ppm;
    expect(short).toBeCloseTo(Math.sqrt(60 * white + steady ** 2), 2);
    expect(detectorPrecision(red, 12, false)(0.4, 1e9).ppm).toBeCloseTo(100, 0);
    const one = detectorPrecision(
      { ...red, readNoise: 0, darkRate: 0, siteAltitudeM: null, skyBrightness: 40 },
      12,
      true,
    );
    expect(one(0.4, 5).ppm / one(0.4, 10).ppm).toBeCloseTo(Math.SQRT2, 9);
  });

  test.each([
    [["--diameters", "0", "--exposures", "60", "--magnitude", "10"], /“0” is no diameter/],
    [["--diameters", "1,,2", "--exposures", "60", "--magnitude", "10"], /commas between/],
    [["--diameters", "1", "--exposures", "60y", "--magnitude", "10"], /“60y” is no time/],
    [["--diameters", "1", "--exposures", "60", "--magnitude", "bright"], /takes a magnitude/],
    [["--exposures", "60", "--magnitude", "10"], /--diameters is missing/],
    [[...GRID, "--card", "practice-30"], /gives its noise as a formula/],
    [[...GRID, "more"], /“more” stands alone/],
    [[...GRID, "--format", "ecsv"], /text or csv/],
  ])("%j is not understood", async (args, words) => {
    put("x", "");
    const { code, out, err } = await precision(...args);
    expect([code, out]).toEqual([2, ""]);
    expect(err).toMatch(words);
  });
});
