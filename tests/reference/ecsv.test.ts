import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { ROOT } from "#scripts/lib/root.ts";
import { ownFolder, run } from "#tests/unit/command-line/support.ts";
import { type ReadTable, readEcsv } from "#tests/unit/formats/ecsv/support.ts";
import { runAstropy } from "./astropy.ts";

interface AstropyColumn {
  name: string;
  unit: string;
  description: string;
  ucd: string;
  /** With all digits; null for a blank. */
  cells: (string | null)[];
}

interface Answers {
  written: Record<string, { text: string; columns: AstropyColumn[] }>;
  read: {
    columns: AstropyColumn[];
    unknown: string[];
    /** Size of the unit over the size it should have. */
    ratios: Record<string, number>;
    meta: Record<string, unknown>;
  };
}

const { folder } = ownFolder();
const STARS = join(ROOT, "data-demo/practice-stars.csv");
let ours = "";
let answers: Answers;

beforeAll(async () => {
  const args = ["--card", "practice-30", "--campaign", "practice-180d", "--recipe", "practice"];
  ({ out: ours } = await run(folder, "derive", STARS, ...args));
  answers = (await runAstropy("ecsv_files.py", { ours })) as Answers;
}, 120_000);

/** A cell as astropy's, whatever our reader keeps it as. */
const same = (cell: string | number | null, theirs: string | null): boolean => {
  if (cell === null || theirs === null) return cell === theirs;
  return typeof cell === "number" ? cell === Number(theirs.replace("inf", "Infinity")) : cell === theirs;
};

const compare = ({ header, rows }: ReadTable, columns: readonly AstropyColumn[]): void => {
  // Masks that stand beside their columns have been taken into them.
  const kept = header.columns.map((c, index) => ({ ...c, index })).filter((c) => !c.name.endsWith(".mask"));
  expect(kept.map((c) => c.name)).toEqual(columns.map((c) => c.name));
  for (const [i, { index, name, unit, ucd, description }] of kept.entries()) {
    const theirs = columns[i];
    if (!theirs) throw new Error(`astropy has no column ${name}.`);
    expect([name, unit, ucd, description]).toEqual([name, unit, theirs.ucd, theirs.description]);
    expect(rows.length, name).toBe(theirs.cells.length);
    for (const [row, cell] of theirs.cells.entries()) {
      const own = rows[row]?.[index] ?? null;
      expect([name, row, own, cell, same(own, cell)]).toEqual([name, row, own, cell, true]);
    }
  }
};

describe("ECSV that astropy wrote reads the same here", () => {
  const kinds = ["every type", "blanks", "units", "no rows", "one row", "one column"];
  const names = kinds.flatMap((kind) =>
    ["blanks", "commas"].flatMap((between) =>
      ["null_value", "data_mask"].map((how) => `${kind}, ${between}, ${how}`),
    ),
  );

  test.each(names)("%s", async (name) => {
    const file = answers.written[name];
    if (!file) throw new Error(`astropy wrote no table ${name}.`);
    const table = await readEcsv(file.text, 61);
    expect(table.refused).toEqual([]);
    compare(table, file.columns);
  });

  test("its units, UCDs and title are there", async () => {
    const { header } = await readEcsv(answers.written["units, blanks, null_value"]?.text ?? "", 61);
    expect(header.columns).toMatchObject([
      { name: "pmra", unit: "mas / yr", ucd: "pos.pm;pos.eq.ra", description: 'In "RA": é' },
      { name: "logg", unit: "dex(cm / s2)", ucd: "phys.gravity" },
      { name: "id", type: "int64" },
    ]);
    expect(header.meta).toMatchObject({ title: "Stars: near", sources: ["one", "two"] });
  });
});

describe("a derived table read by astropy", () => {
  test("has the same cells, descriptions and UCDs", async () => {
    compare(await readEcsv(ours, 4096), answers.read.columns);
    expect(answers.read.columns.find((c) => c.name === "source_id")?.cells[0]).toBe("3141592653589793239");
  });

  test("has units that astropy understands, but for parts per million, which it has none for", () => {
    for (const [name, ratio] of Object.entries(answers.read.ratios))
      expect(Math.abs(ratio - 1), name).toBeLessThan(1e-12);
    expect(answers.read.unknown).toEqual(["earth_depth", "earth_depth_err", "noise_1h"]);
  });

  test("says what it was made with", () => {
    expect(answers.read.meta).toMatchObject({
      recipe: "Practice",
      recipe_version: 1,
      card: "Practice 30",
      campaign: "180 days",
      rows_read: 3,
      rows_written: 3,
    });
  });
});
