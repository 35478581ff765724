import { readFileSync } from "node:fs";
import type { Download, Page } from "playwright-core";
import { expect } from "vitest";
import type { Person } from "#server/database/entities/person.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { PATIENCE_MS } from "./browser.ts";
import { buildMember, buildPerson, buildProgramme } from "./factories.ts";
import { ALL_ROLES, demoFile } from "./furnished.ts";
import type { LiveApp } from "./live-app.ts";

/** While the table is prepared the server says so with 503, and the page asks again. */
export const PREPARING = /status of 503/;

/** The whole way, on a machine that is busy with much else. */
export const JOURNEY_MS = 600_000;

/**
 * The practice stars without an epoch and with -999 for a blank, which only a person can explain; one position that
 * cannot be, and one row twice.
 */
export const PRACTICE_FILE_THAT_ASKS = {
  name: "practice.csv",
  mimeType: "text/csv",
  buffer: Buffer.from(
    [
      "source_id,designation,ra,dec,parallax,parallax_error,ks_mag,ks_mag_error,teff,teff_error,card_mag,logg",
      "3141592653589793239,LH-0031,217.425,-0.2041572,60.00,0.05,7.912,0.020,3350,60,10.2,-999",
      "1234567890123456789,LH-0052,10.5,41.2,81.30,0.05,9.431,0.020,2950,60,12.4,5.1",
      "6917529027641081857,LH-0077,122.25,-35.75,38.50,0.05,6.850,0.020,3650,60,9.1,4.7",
      "6917529027641081858,LH-0078,122.25,95.75,38.50,0.05,6.850,0.020,3650,60,9.1,4.7",
      "1234567890123456789,LH-0052,10.5,41.2,81.30,0.05,9.431,0.020,2950,60,12.4,5.1",
      "",
    ].join("\n"),
  ),
};

/** Identifiers beyond what a number of the browser can hold. */
export const IDENTIFIERS = {
  "LH-0031": "3141592653589793239",
  "LH-0052": "1234567890123456789",
  "LH-0077": "6917529027641081857",
} as const;

/** What is typed into the form of the practice card, in its order. */
export const CARD_FIGURES: readonly (readonly [string, string])[] = [
  ["Name", "Practice 30"],
  ["Source", "Invented for practice."],
  ["Reference magnitude", "10"],
  ["Photons", "90"],
  ["Background", "12"],
  ["Floor", "25"],
  ["Bright limit", "7"],
  ["Faint limit", "14.5"],
];

export const CAMPAIGN_FIGURES: readonly (readonly [string, string])[] = [
  ["Name", "180 days"],
  ["Length", "180"],
  ["Share of time observed", "0.9"],
  ["Transits needed", "2"],
  ["Signal-to-noise limit", "7.1"],
];

export interface Traveller {
  person: Person;
  programme: Programme;
}

/** Someone with a password and an empty programme by the practice recipe; a figure of merit waits to be changed. */
export const buildTraveller = async (app: LiveApp): Promise<Traveller> => {
  const programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  const { person } = await buildMember(app.deps.db, {
    roles: ALL_ROLES,
    person: await buildPerson(app.deps.db),
    programme,
  });
  const { agent } = await app.as(person);
  await agent
    .post(`/api/programmes/${programme.id}/merits`)
    .send(JSON.parse(demoFile("small-suns-warm-rocks.json")))
    .expect(201);
  return { person, programme };
};

const plain = (text: string): string => text.replace(/[\s\u2009\u202f]+/g, " ").trim();

/** The sum of rows as the page writes it, checked to add up; `[read, accepted, refused, skipped]`. */
export const rowSum = async (page: Page): Promise<number[]> => {
  const text = plain((await page.locator("p", { hasText: "rows read" }).last().textContent()) ?? "");
  const rows = /(\d+) rows read ?= (\d+) accepted ?\+ (\d+) refused ?\+ (\d+) skipped/
    .exec(text)
    ?.slice(1)
    .map(Number);
  if (!rows) throw new Error(`No sum of rows in “${text}”.`);
  const [read = 0, ...parts] = rows;
  expect(parts.reduce((sum, n) => sum + n, 0)).toBe(read);
  return rows;
};

export type GridRow = Readonly<Record<string, string>>;

/** What the grid shows, row by row from the top, by the labels of its columns. */
export const gridRows = (page: Page): Promise<GridRow[]> =>
  page.evaluate(() => {
    const words = (e: Element | undefined) =>
      (e?.textContent ?? "").replace(/[\s\u2009\u202f]+/g, " ").trim();
    const grid = document.querySelector('[role="grid"]');
    const heads = [...(grid?.querySelectorAll('[role="columnheader"] > span:first-child') ?? [])].map((e) =>
      words(e).replace(/^[▲▼] /, ""),
    );
    return [...(grid?.querySelectorAll('[role="row"]:not([aria-rowindex="1"])') ?? [])]
      .sort((a, b) => Number(a.getAttribute("aria-rowindex")) - Number(b.getAttribute("aria-rowindex")))
      .map((row) => Object.fromEntries([...row.children].map((cell, i) => [heads[i] ?? "", words(cell)])));
  });

/** Waits until the grid shows these stars in this order. */
export const waitForStars = (page: Page, names: readonly string[]): Promise<void> =>
  expect
    .poll(async () => (await gridRows(page)).map((row) => row.Star), { timeout: PATIENCE_MS })
    .toEqual(names);

/** The practice stars as the table writes them: the printed digits, cut where the error says. */
const PRACTICE_CELLS: Readonly<Record<keyof typeof IDENTIFIERS, GridRow>> = {
  "LH-0031": {
    Teff: "3 350 ±60",
    Radius: "0.334 ±0.010",
    "HZ inner": "0.117 ±0.005",
    "P tr": "1.38 ±0.05",
    "Noise 1 h": "103",
    Transits: "6",
    "R min": "0.496 ±0.010",
  },
  "LH-0052": {
    Teff: "2 950 ±60",
    Radius: "0.145 ±0.004",
    "HZ inner": "0.0395 ±0.0020",
    "P tr": "1.78 ±0.07",
    "Noise 1 h": "294",
    Transits: "20",
    "R min": "0.337 ±0.007",
  },
  "LH-0077": {
    Teff: "3 650 ±60",
    Radius: "0.653 ±0.019",
    "HZ inner": "0.270 ±0.012",
    "P tr": "1.16 ±0.04",
    "Noise 1 h": "64.7",
    Transits: "2",
    "R min": "0.840 ±0.016",
  },
};

/** Every practice star with its cells and its identifier to the last digit; other columns may stand between them. */
export const expectPracticeStars = (rows: readonly GridRow[]): void => {
  for (const [star, cells] of Object.entries(PRACTICE_CELLS))
    expect(rows.find((row) => row.Star === star)).toMatchObject({
      ...cells,
      Identifier: IDENTIFIERS[star as keyof typeof IDENTIFIERS],
    });
};

export const contentOf = async (download: Download): Promise<string> =>
  readFileSync(await download.path(), "utf8");

type Line = Readonly<Record<string, string>>;

/** Rows by column name; the files of these stars quote nothing. */
const linesOf = (text: string): Line[] => {
  const [head = "", ...rows] = text.trim().split(/\r?\n/);
  const names = head.split(",");
  return rows.map((row) => Object.fromEntries(row.split(",").map((cell, i) => [names[i] ?? "", cell])));
};

/** Both files of the list of LH-0052 and LH-0031: identifiers whole, values to the printed digits. */
export const expectExports = (csv: string, ecsv: string): void => {
  const table = ecsv.split(/\r?\n/).filter((line) => !line.startsWith("#"));
  expect(ecsv.startsWith("# %ECSV 1.0")).toBe(true);
  expect(ecsv).toContain("# - {name: source_id, datatype: string");
  for (const lines of [linesOf(csv), linesOf(table.join("\n"))]) {
    expect(lines.map((line) => [line.place, line.designation, line.source_id])).toEqual([
      ["1", "LH-0052", IDENTIFIERS["LH-0052"]],
      ["2", "LH-0031", IDENTIFIERS["LH-0031"]],
    ]);
    const digits = (key: string, n: number) => lines.map((line) => Number(line[key]).toFixed(n));
    expect(digits("radius", 4)).toEqual(["0.1452", "0.3344"]);
    expect(digits("earth_period", 2)).toEqual(["7.85", "24.55"]);
    expect(digits("noise_1h", 1)).toEqual(["294.1", "102.8"]);
    expect(digits("transits", 0)).toEqual(["20", "6"]);
    expect(digits("r_min", 3)).toEqual(["0.337", "0.496"]);
  }
};
