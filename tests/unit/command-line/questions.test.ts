import { describe, expect, test } from "vitest";
import { ownFolder, run } from "./support.ts";

const { folder, put } = ownFolder();

const derive = (...more: string[]) =>
  run(folder, "derive", "t.csv", "--card", "practice-30", "--campaign", "practice-180d", ...more);

/** A table of one or a few rows; every other column is beyond doubt. */
const table = (header: string, ...rows: string[]): string =>
  [`name,ra,dec,epoch,${header}`, ...rows.map((row, i) => `S${i},200.5,-10.5,2016,${row}`)]
    .join("\n")
    .concat("\n");

/** The plan that the message offers, with the one number filled in that it leaves open. */
const offered = (err: string): string =>
  err.slice(err.indexOf("  {")).replace('"epoch": null', '"epoch": 2016');

interface Case {
  readonly what: string;
  readonly file: string;
  readonly question: RegExp;
}

const many = (row: (i: number) => string): string[] => Array.from({ length: 60 }, (_, i) => row(i));

const CASES: readonly Case[] = [
  {
    what: "hours or degrees",
    file: `name,ra,dec,epoch,Kmag\n${many((i) => `S${i},${i / 3},${i * 2 - 60},2016,8`).join("\n")}\n`,
    question: /RA has no unit.*hours or degrees/,
  },
  {
    what: "which of two columns",
    file: table("Kmag,k_m", "8.1,8.2"),
    question: /“Kmag” and “k_m” can each give Ks/,
  },
  {
    what: "a parallax that may be in mas or in arcsec",
    file: table("plx,Kmag", "0.06,8", "0.5,9"),
    question: /“plx” has no unit, and its values fit more than one\..*mas or arcsec/,
  },
  {
    what: "motions that may be in mas or in arcsec a year",
    file: table("pmra,pmdec,Kmag", "1.5,-2,8"),
    question: /“pmra” has no unit[\s\S]*“pmdec” has no unit/,
  },
  {
    what: "a temperature in kK",
    file: table("Teff,Kmag", "3.35,8"),
    question: /“Teff” has no unit.*K or kK/,
  },
  {
    what: "a distance in pc or kpc",
    file: table("dist,Kmag", "2.5,8"),
    question: /“dist” has no unit.*pc or kpc/,
  },
  { what: "a light share in percent", file: table("light_share,Kmag", "98,8"), question: /a fraction or %/ },
  { what: "an unknown unit", file: table("plx [furlong],Kmag", "60,8"), question: /The unit “furlong”/ },
  {
    what: "the magnitude system",
    file: table("gmag,Kmag", "10,8"),
    question: /“gmag” may be a magnitude of the AB system/,
  },
  {
    what: "the epoch of stars that move",
    file: "name,ra,dec,pmra,pmdec,Kmag\nS,200.5,-10.5,300,-120,8\n",
    question: /does not say at which date its positions are true/,
  },
  {
    what: "a mark for no value",
    file: table("Kmag", ...many((i) => (i % 10 === 0 ? "-999" : `${8 + i / 100}`))),
    question: /-999 stands 6 times in “Kmag”/,
  },
];

describe("a question that the file cannot answer", () => {
  test.each(CASES)(
    "$what: it is named with code 2, and the plan that it offers answers it",
    async ({ file, question }) => {
      put("t.csv", file);
      const { code, out, err } = await derive();
      expect(err).toMatch(question);
      expect([code, out]).toEqual([2, ""]);
      put("plan.json", offered(err));
      const answered = await derive("--plan", "plan.json");
      expect(answered.err).toMatch(/rows read/);
      expect(answered.code).toBe(0);
    },
  );

  test("an epoch is not offered: it is asked for until a year is filled in", async () => {
    put("t.csv", "name,ra,dec,pmra,pmdec,Kmag\nS,200.5,-10.5,300,-120,8\n");
    const { err } = await derive();
    put("plan.json", err.slice(err.indexOf("  {")));
    expect((await derive("--plan", "plan.json")).code).toBe(2);
  });

  test("without motions nothing needs an epoch: it stays blank", async () => {
    put("t.csv", "name,ra,dec,Kmag\nS,200.5,-10.5,8\n");
    const { code, out } = await derive("--format", "csv");
    expect(code).toBe(0);
    expect(out).toContain("S,,,200.5,-10.5,,");
  });

  test("all questions are asked at once", async () => {
    put("t.csv", "name,ra,dec,pmra,pmdec,plx,Kmag,k_m\nS,200.5,-10.5,300,-120,0.06,8,8\n");
    const { err } = await derive();
    expect(err).toMatch(/3 questions are open/);
    put("plan.json", offered(err));
    expect((await derive("--plan", "plan.json")).code).toBe(0);
  });

  test("a UCD that speaks of something else, in ECSV", async () => {
    put(
      "t.csv",
      `# %ECSV 1.0
# ---
# datatype:
# - {name: name, datatype: string}
# - {name: K, unit: mag, datatype: float64, meta: {ucd: phys.temperature}}
name K
S 8
`,
    );
    const { code, err } = await derive();
    expect(code).toBe(2);
    expect(err).toMatch(/“K” is spelled like Ks, and its UCD, phys\.temperature, says something else/);
  });
});

describe("no question", () => {
  test.each([
    ["a parallax above any in arcsec", table("plx,Kmag", "0.06,8", "60,9")],
    ["motions of which one is above any in arcsec a year", table("pmra,pmdec,Kmag", "150,2,8")],
    ["a unit in the header", table("plx [arcsec],Kmag", "0.06,8")],
    ["a unit in the name", "name,RAdeg,DEdeg,epoch,Kmag\nS,10.5,-10.5,2016,8\n"],
    ["hours, minutes and seconds", "name,ra,dec,epoch,Kmag\nS,14:29:42,-01 02 03,2016,8\n"],
  ])("%s", async (_, file) => {
    put("t.csv", file);
    expect(await derive()).toMatchObject({ code: 0 });
  });

  test("of two columns with one meaning the UCD may name the main one", async () => {
    put(
      "t.csv",
      `# %ECSV 1.0
# ---
# datatype:
# - {name: name, datatype: string}
# - {name: id, datatype: int64, meta: {ucd: meta.id}}
# - {name: source_id, datatype: int64, meta: {ucd: meta.id;meta.main}}
# - {name: Kmag, unit: mag, datatype: float32}
name id source_id Kmag
S 1 3141592653589793239 8
`,
    );
    const { code, out } = await derive("--format", "csv");
    expect(code).toBe(0);
    expect(out).toMatch(/\nS,3141592653589793239,/);
  });
});
