import { readdirSync, symlinkSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { DEFAULT_RECIPE, PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { type ReadTable, readEcsv } from "../formats/ecsv/support.ts";
import { ownFolder, readIn, run } from "./support.ts";

const { folder, put } = ownFolder();
const WITH = ["--card", "practice-30", "--campaign", "practice-180d"];

const derive = (file: string, ...more: string[]) => run(folder, "derive", file, ...WITH, ...more);

const cellsOf =
  ({ header, rows }: ReadTable) =>
  (row: number, key: string) =>
    rows[row]?.[header.columns.findIndex((c) => c.name === key)];

const STARS = `source_id,ra,dec,ref_epoch,parallax,parallax_error,ks_mag,teff,card_mag
3141592653589793239,217.425,-0.2041572,2016.0,60.00,0.05,7.912,3350,10.2
3141592653589793240,10.5,41.2,2016.0,-81.30,0.05,9.431,,12.4
3141592653589793239,217.425,-0.2041572,2016.0,60.00,0.05,7.912,3350,10.2
3141592653589793241,400,41.2,2016.0,81.30,0.05,9.431,2950,12.4
3141592653589793242,10.5
`;

describe("derive", () => {
  test("writes a row for each star: keys, errors, reasons where blank, and what it was made with", async () => {
    put("stars.csv", STARS);
    const { code, out, err } = await derive("stars.csv", "--recipe", "practice");
    expect(code).toBe(0);
    expect(err).toMatch(/^5 rows read: 2 written, 2 refused, 1 skipped/);
    expect(err).toMatch(/RA 400° lies outside 0 to 360°/);
    const read = await readEcsv(out, 65_536);
    const cell = cellsOf(read);
    expect(read.rows).toHaveLength(2);
    expect(Number(cell(0, "radius")).toFixed(4)).toBe("0.3344");
    expect(cell(0, "radius_blank")).toBeNull();
    expect(Number(cell(0, "r_min")).toFixed(3)).toBe("0.496");
    // Without an error of Ks the radius has none of its own.
    expect(cell(0, "ks_mag_err")).toBeNull();
    expect(cell(1, "distance")).toBeNull();
    expect(cell(1, "distance_blank")).toBe("parallax-not-positive");
    expect(cell(1, "parallax")).toBe(-81.3);
    expect(cell(1, "teff_blank")).toBe("needs-teff");
    expect(cell(1, "transits_blank")).toBe("needs-orbit");
    expect(out).toMatch(/# - recipe: "Practice"\n# - recipe_version: 1\n# - recipe_hash: "[0-9a-f]{64}"/);
    expect(out).toMatch(/# - card: "Practice 30"/);
    expect(out).toMatch(/# - rows_read: 5\n# - rows_written: 2\n# - rows_refused: 2\n# - rows_skipped: 1/);
  });

  test("the same file gives the same bytes, and a derived table derives to the same rows", async () => {
    put("stars.csv", STARS);
    await derive("stars.csv", "--out", "one.ecsv");
    await derive("stars.csv", "--out", "two.ecsv");
    expect(readIn(folder, "two.ecsv")).toBe(readIn(folder, "one.ecsv"));
    expect((await derive("one.ecsv", "--out", "again.ecsv")).code).toBe(0);
    const body = (name: string): string => readIn(folder, name).replace(/^#.*\n/gm, "");
    expect(body("again.ecsv")).toBe(body("one.ecsv"));
  });

  test("the extract is not written over, under whatever name", async () => {
    put("stars.csv", STARS);
    symlinkSync(join(folder, "stars.csv"), join(folder, "link.csv"));
    for (const name of ["stars.csv", "./stars.csv", "link.csv"]) {
      const { code, err } = await derive("stars.csv", "--out", name);
      expect(code).toBe(2);
      expect(err).toMatch(/--out names the extract itself/);
    }
    expect(readIn(folder, "stars.csv")).toBe(STARS);
  });

  test("CSV carries the keys alone, with the same values", async () => {
    put("stars.csv", STARS);
    const [csv, ecsv] = [await derive("stars.csv", "--format", "csv"), await derive("stars.csv")];
    expect(csv.out.split("\r\n").slice(0, 3).join("\n")).toBe(
      ecsv.out
        .replace(/^#.*\n/gm, "")
        .trimEnd()
        .split("\n")
        .slice(0, 3)
        .join("\n"),
    );
  });

  test("units, decimal commas and hours are converted", async () => {
    put(
      "units.csv",
      "name;RA [h];DE [deg];epoch;Plx [arcsec];e_Plx;Kmag;Teff [kK]\nA;14,495;-0,2041572;2016,0;0,06;0,00005;7,912;3,35\n",
    );
    const { code, out } = await derive("units.csv", "--recipe", "practice");
    expect(code).toBe(0);
    const cell = cellsOf(await readEcsv(out, 65_536));
    expect(Number(cell(0, "ra"))).toBeCloseTo(217.425, 9);
    expect(Number(cell(0, "parallax"))).toBeCloseTo(60, 12);
    // The error has no unit of its own and takes that of its value.
    expect(Number(cell(0, "parallax_err"))).toBeCloseTo(0.05, 12);
    expect(cell(0, "teff")).toBe(3350);
    expect(Number(cell(0, "radius")).toFixed(4)).toBe("0.3344");
  });

  test("a recipe from a file counts, under its own name and hash", async () => {
    put("stars.csv", STARS);
    put("mine.json", JSON.stringify({ name: "Mine", settings: PRACTICE_RECIPE.settings }));
    const [mine, shipped] = [
      await derive("stars.csv", "--recipe", "mine.json"),
      await derive("stars.csv", "--recipe", "practice"),
    ];
    expect(mine.out).toMatch(/# - recipe: "Mine"/);
    expect(mine.out.replace('"Mine"', '"Practice"')).toBe(shipped.out);
    put("bad.json", JSON.stringify({ name: "Bad", settings: { ...DEFAULT_RECIPE.settings, radius: [] } }));
    const bad = await derive("stars.csv", "--recipe", "bad.json");
    expect([bad.code, bad.out]).toEqual([1, ""]);
    expect(bad.err).toMatch(/settings\.radius: At least one/);
  });
});

describe("a failure leaves nothing behind", () => {
  const leftovers = (): string[] =>
    readdirSync(folder).filter((name) => name.startsWith(".") || name === "no.ecsv");

  test.each([
    ["a missing file", ["derive", "none.csv", ...WITH], 1, /none\.csv cannot be read: it does not exist/],
    ["a folder", ["derive", ".", ...WITH], 1, /it is a folder/],
    ["an empty file", ["derive", "empty.csv", ...WITH], 1, /file is empty/],
    ["a picture", ["derive", "picture.csv", ...WITH], 1, /a picture, not a table/],
    ["a table without a row to use", ["derive", "useless.csv", ...WITH], 1, /No row could be accepted/],
    ["a file cut off", ["derive", "cut.csv", ...WITH], 1, /ends in the middle of line 3/],
    ["rounded identifiers", ["derive", "rounded.ecsv", ...WITH], 1, /keeps 15 digits/],
    ["no card", ["derive", "stars.csv", "--campaign", "practice-180d"], 2, /--card is missing/],
    ["an unknown card", ["derive", "stars.csv", "--card", "x", "--campaign", "y"], 2, /neither a file nor/],
    [
      "a card that is none",
      ["derive", "stars.csv", "--card", "empty.json", "--campaign", "practice-180d"],
      1,
      /settings/,
    ],
    [
      "no JSON",
      ["derive", "stars.csv", "--card", "stars.csv", "--campaign", "practice-180d"],
      1,
      /is not JSON/,
    ],
    [
      "a card for a campaign",
      ["derive", "stars.csv", "--card", "practice-30", "--campaign", "practice-30"],
      1,
      /campaign/,
    ],
    [
      "an unknown recipe",
      ["derive", "stars.csv", ...WITH, "--recipe", "x"],
      2,
      /neither a file nor a recipe/,
    ],
    ["an unknown option", ["derive", "stars.csv", ...WITH, "--colour"], 2, /--colour/],
    ["an option without its value", ["derive", "stars.csv", "--card"], 2, /--card/],
    ["an unknown format", ["derive", "stars.csv", ...WITH, "--format", "xml"], 2, /ecsv or csv/],
    ["two files", ["derive", "stars.csv", "stars.csv", ...WITH], 2, /One operand/],
    ["no file", ["derive", ...WITH], 2, /file to read is missing/],
    [
      "no folder to write to",
      ["derive", "stars.csv", ...WITH, "--out", "none/x.ecsv"],
      1,
      /its folder does not exist/,
    ],
    ["a plan of another file", ["derive", "stars.csv", ...WITH, "--plan", "other-plan.json"], 1, /“RAJ2000”/],
    [
      "a plan with an unknown key",
      ["derive", "stars.csv", ...WITH, "--plan", "bad-plan.json"],
      1,
      /“colour” is no key/,
    ],
  ])("%s", async (_, args, code, words) => {
    put("stars.csv", STARS);
    put("empty.csv", "");
    put("empty.json", "{}");
    put("picture.csv", Buffer.from("\u0089PNG\r\n\u001a\n", "latin1"));
    put("useless.csv", `${STARS.split("\n")[0]}\n1,400,0,2016,60,0.05,7,3300,10\n`);
    put("cut.csv", `${STARS.split("\n").slice(0, 2).join("\n")}\n3141592653589793240,10.5,41.2`);
    put(
      "rounded.ecsv",
      "# %ECSV 1.0\n# ---\n# datatype:\n# - {name: source_id, datatype: float64}\n# - {name: ks_mag, datatype: float64}\nsource_id ks_mag\n3141592653589793239 7.9\n",
    );
    put("other-plan.json", JSON.stringify({ columns: { RAJ2000: { key: "ra", unit: "deg" } } }));
    put("bad-plan.json", JSON.stringify({ columns: { ra: { key: "colour" } } }));
    const isWriting = !args.includes("--out");
    const ended = await run(folder, ...args, ...(isWriting ? ["--out", "no.ecsv"] : []));
    expect(ended.err).toMatch(words);
    expect([ended.code, ended.out]).toEqual([code, ""]);
    // What, why, and what to do.
    expect(ended.err).toMatch(/^shortlight: .+\n {2}\S/);
    expect(leftovers()).toEqual([]);
  });
});
