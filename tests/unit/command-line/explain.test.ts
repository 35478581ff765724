import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { z } from "zod";
import { ROOT } from "#scripts/lib/root.ts";
import { editDistance, Nearest } from "#server/command-line/nearest.ts";
import { workings } from "#shared/api/workings.ts";
import { columnsOf } from "#shared/catalogue/columns.ts";
import { ownFolder, run } from "./support.ts";

const { folder } = ownFolder();
const STARS = join(ROOT, "data-demo/practice-stars.csv");
const SEEN = ["--card", "practice-30", "--campaign", "practice-180d"];

const explain = (...args: string[]) => run(folder, "explain", STARS, "--recipe", "practice", ...args);

describe("explain", () => {
  test("shows formula, numbers, range, error and source of a quantity, and of those it rests on", async () => {
    const { code, out } = await explain("--star", "LH-0031", "--quantity", "radius");
    expect(code).toBe(0);
    expect(out).toMatch(/^LH-0031: Radius\nrecipe Practice v1 · [0-9a-f]{8}\n/);
    expect(out).toMatch(/R = 0\.33439\d+ solRad ± 0\.00997\d+ solRad/);
    expect(out).toMatch(/holds for M_Ks from 4\.6 to 9\.8: 6\.8027\d+, inside/);
    expect(out).toMatch(/Mann et al\. 2015/);
    expect(out).toMatch(/\nDistance, inverse of the parallax\n/);
  });

  test("takes the identifier, and spaces and case of a designation do not count", async () => {
    const byName = await explain("--star", "lh-0031", "--quantity", "mass");
    const byId = await explain("--star", "3141592653589793239", "--quantity", "mass");
    expect(byName.code).toBe(0);
    expect(byId.out).toBe(byName.out);
  });

  test("every derived quantity has workings; as JSON they are those of the interface", async () => {
    for (const { key } of columnsOf("stellar", "instrument").filter((c) => c.key !== "flags")) {
      const { code, out } = await explain("--star", "LH-0031", "--quantity", key, ...SEEN, "--json");
      expect([key, code]).toEqual([key, 0]);
      const [only] = z.array(workings).parse(JSON.parse(out));
      expect(only?.steps[0]?.key).toBe(key);
      expect([only?.card, only?.campaign]).toEqual(["Practice 30", "180 days"]);
    }
  });

  test("several quantities come one after the other, with draws of the same seed", async () => {
    const args = [
      "--star",
      "LH-0031",
      "--quantity",
      "radius",
      "--quantity",
      "mass",
      "--draws",
      "500",
      "--seed",
      "3",
    ];
    const { code, out } = await explain(...args);
    expect(code).toBe(0);
    expect(out).toMatch(/^LH-0031: Radius[\s\S]*500 draws, seed 3: 16 % 0\.32[\s\S]*LH-0031: Mass/);
    expect((await explain(...args)).out).toBe(out);
    const all = z.array(workings).parse(JSON.parse((await explain(...args, "--json")).out));
    expect(all.map(({ steps }) => steps[0]?.key)).toEqual(["radius", "mass"]);
    expect(all[0]?.drawn?.intervals.radius?.p50).toBeCloseTo(0.334, 2);
  });

  test.each([
    [["--star", "LH-0031", "--quantity", "radius", "--draws", "7"], /100 to 20 000/],
    [["--star", "LH-0031", "--quantity", "radius", "--seed", "7"], /no draws/],
    [["--star", "LH-0032", "--quantity", "radius"], /“LH-0032”[\s\S]*nearest spellings are LH-0031, /],
    [["--star", "3141592653589793249", "--quantity", "radius"], /nearest spellings are 31415926535897932/],
    [["--star", "LH-0031", "--quantity", "radios"], /nearest keys are radius/],
    [["--star", "LH-0031", "--quantity", "parallax"], /given by the file/],
    [["--star", "LH-0031", "--quantity", "r_min"], /--card and --campaign/],
    [["--star", "LH-0031", "--quantity", "r_min", "--card", "practice-30"], /Only one of card and campaign/],
    [["--star", "LH-0031"], /--quantity is missing/],
    [["--quantity", "radius"], /--star is missing/],
  ])("%j ends with code 2", async (args, words) => {
    const { code, out, err } = await explain(...args);
    expect([code, out]).toEqual([2, ""]);
    expect(err).toMatch(words);
  });
});

describe("the nearest spellings", () => {
  test.each([
    ["", "", 0],
    ["abc", "", 3],
    ["kitten", "sitting", 3],
    ["LH-0031", "LH-0013", 2],
  ])("from %j to %j are %d changes", (a, b, changes) => {
    expect(editDistance(a, b)).toBe(changes);
    expect(editDistance(b, a)).toBe(changes);
  });

  test("are the three with the fewest changes, each once", () => {
    const nearest = new Nearest("abcd", (text) => text);
    for (const text of ["zzzz", "abcx", "abcd", "abcx", "abzz", "azzz"]) nearest.show(text);
    expect(nearest.texts).toEqual(["abcd", "abcx", "abzz"]);
  });
});
