import { readdir, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { buildScanIndex } from "#server/scan/build.ts";
import { openView } from "#server/scan/view.ts";
import { EMPTY_VIEW, type ViewSpec } from "#shared/catalogue/view.ts";
import { startTestApp, type TestApp } from "#tests/support/app.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { buildSky } from "#tests/support/sky.ts";

const STARS = 25_000;
let app: TestApp;
let programme: Programme;
let folder: string;

const key = (edition = programme.edition) => ({
  programmeId: programme.id,
  edition,
  cardVersionId: null,
  campaignVersionId: null,
});
const files = async (): Promise<string[]> => (await readdir(folder)).sort();

beforeAll(async () => {
  app = await startTestApp();
  programme = await buildProgramme(app.deps.db);
  await buildSky(app.deps, programme, [{ designation: "First", values: { g_mag: 1 } }], 1n);
  await app.deps.db.query(
    `INSERT INTO star (programme_id, star_id, from_edition, designation, g_mag, teff, ruwe)
     SELECT ?, seq, 1, CONCAT('S-', LPAD(seq MOD 977, 4, '0')), 5 + seq MOD 7, IF(seq MOD 5 = 0, NULL, 2600 + seq MOD 1300),
       1 + (seq MOD 10) / 10 FROM seq_2_to_${STARS}`,
    [programme.id],
  );
  await buildScanIndex(app.deps, key());
  const [name] = await readdir(app.deps.config.folders.scan);
  folder = join(app.deps.config.folders.scan, name ?? "");
});

const view = (more: Partial<ViewSpec> = {}): Promise<Awaited<ReturnType<typeof openView>>> =>
  openView(app.deps, programme.id, { ...EMPTY_VIEW, ...more });
const cut = (expression: string) => ({ label: "", expression, blanks: "drop" as const });
const plain = async (where: string, order: string): Promise<string[]> => {
  const rows: { star_id: string }[] = await app.deps.db.query(
    `SELECT star_id FROM star WHERE programme_id = ? AND ${where} ORDER BY ${order}`,
    [programme.id],
  );
  return rows.map((row) => String(row.star_id));
};

describe("a view of many stars", () => {
  test.each([
    ["asc", "teff IS NULL, teff, g_mag, BINARY designation, star_id"],
    ["desc", "teff IS NULL, teff DESC, g_mag, BINARY designation, star_id"],
  ] as const)("has the order of the catalogue itself, %s", async (direction, order) => {
    const expected = await plain("ruwe < 1.45", order);
    const open = await view({ cuts: [cut("ruwe < 1.45")], sort: { key: "teff", direction } });
    expect(await open.count()).toBe(expected.length);
    // The top is asked for on its own, further windows come from the whole order: they must fit together.
    expect(await open.ids(0, 500)).toEqual(expected.slice(0, 500));
    expect(await open.ids(9_000, 500)).toEqual(expected.slice(9_000, 9_500));
    expect(await open.ids(expected.length - 3, 500)).toEqual(expected.slice(-3));
    const [some, other] = [expected[40] ?? "", expected[9_123] ?? ""];
    const places = await open.placesOf([some, other, "10"]);
    expect([places.get(some), places.get(other), places.get("10")]).toEqual([
      41,
      9_124,
      expected.includes("10") ? expected.indexOf("10") + 1 : undefined,
    ]);
  });
});

describe("building", () => {
  test("that is stopped half-way leaves what was there, and nothing else", async () => {
    const before = await files();
    const stop = new Error("stopped");
    const stopped = buildScanIndex(app.deps, key(), () => {
      throw stop;
    });
    await expect(stopped).rejects.toBe(stop);
    expect(await files()).toEqual(before);
    expect(await (await view()).count()).toBe(STARS);
  });

  test("an edition that is not in force removes what an attempt before it left", async () => {
    const next = programme.edition + 1;
    await writeFile(join(folder, `${next}-5-6.v1.duckdb`), "left over");
    await buildScanIndex(app.deps, key(next));
    expect(await files()).toEqual([`${programme.edition}-0-0.v1.duckdb`, `${next}-0-0.v1.duckdb`]);
  });

  test("anew shows what the new file holds", async () => {
    await app.deps.db.query("UPDATE star SET teff = 9999 WHERE programme_id = ? AND star_id = 1", [
      programme.id,
    ]);
    expect(await (await view({ cuts: [cut("teff == 9999")] })).count()).toBe(0);
    await buildScanIndex(app.deps, key());
    expect(await (await view({ cuts: [cut("teff == 9999")] })).count()).toBe(1);
  });
});
