import { execFile } from "node:child_process";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { ROOT } from "#scripts/lib/root.ts";
import { readEcsv } from "../formats/ecsv/support.ts";
import { shortlight } from "./child.ts";
import { ownFolder, readIn } from "./support.ts";

const { folder } = ownFolder();
const STARS = join(ROOT, "data-demo/practice-stars.csv");
const PRACTICE = ["--card", "practice-30", "--campaign", "practice-180d", "--recipe", "practice"];

/** The printed figures of the practice stars; computed. */
const PRINTED = {
  "LH-0031": {
    abs_ks: "6.803",
    radius: "0.3344",
    mass: "0.3162",
    luminosity: "0.01269",
    hz_inner: "0.1169",
    hz_outer: "0.2287",
    hz_inner_period: "25.96",
    hz_outer_period: "71.05",
    earth_distance: "0.1126",
    earth_period: "24.55",
    transit_probability: "0.0138",
    transit_duration: "2.59",
    earth_depth: "752",
    noise_1h: "102.8",
    r_min: "0.496",
  },
  "LH-0052": { radius: "0.1452", mass: "0.1182", hz_inner: "0.0395", noise_1h: "294.1", r_min: "0.337" },
  "LH-0077": { radius: "0.6533", mass: "0.6294", hz_inner: "0.2701", noise_1h: "64.7", r_min: "0.840" },
} as const;

const decimalsOf = (printed: string): number => printed.split(".")[1]?.length ?? 0;

describe("as a process", { timeout: 120_000 }, () => {
  test("the practice stars come out with their printed figures, named from another folder", async () => {
    const { code, err } = await shortlight(folder, "derive", STARS, ...PRACTICE, "--out", "stars.ecsv");
    expect([code, err]).toEqual([0, "3 rows read: 3 written, 0 refused, 0 skipped.\n"]);
    const { header, rows } = await readEcsv(readIn(folder, "stars.ecsv"), 4096);
    const at = (key: string): number => header.columns.findIndex((c) => c.name === key);
    for (const [name, figures] of Object.entries(PRINTED)) {
      const row = rows.find((cells) => cells[at("designation")] === name) ?? [];
      for (const [key, printed] of Object.entries(figures))
        expect(`${key} ${Number(row[at(key)]).toFixed(decimalsOf(printed))}`).toBe(`${key} ${printed}`);
    }
    const first = rows[0] ?? [];
    expect(first[at("source_id")]).toBe("3141592653589793239");
    expect(first[at("transits")]).toBe("6");
    expect(first[at("radius_blank")]).toBeNull();
    expect(header.columns[at("hz_inner")]).toMatchObject({ unit: "AU", ucd: "phys.size.smajAxis;stat.min" });
  });

  test("a reader that has had enough ends it quietly", async () => {
    const script = join(ROOT, "scripts/shortlight.mjs");
    const command = `"${process.execPath}" "${script}" derive "${STARS}" ${PRACTICE.join(" ")} | head -c 10; exit \${PIPESTATUS[0]}`;
    const err = await new Promise<string>((resolve, reject) => {
      execFile("bash", ["-c", command], { cwd: folder }, (error, _, said) =>
        error ? reject(error) : resolve(said),
      );
    });
    expect(err).not.toMatch(/EPIPE|defect|Error/);
  });

  test("what cannot be read is said on the standard error alone", async () => {
    const { code, out, err } = await shortlight(folder, "derive", "nothing.csv", ...PRACTICE);
    expect([code, out]).toEqual([1, ""]);
    expect(err).toMatch(/nothing\.csv cannot be read: it does not exist\./);
  });
});
