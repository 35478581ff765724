import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import { fileURLToPath } from "node:url";
import { afterAll, describe, expect, test } from "vitest";
import { previewOf } from "#server/extracts/preview.ts";
import { readSample } from "#server/extracts/read-sample.ts";
import { FolderStorage } from "#server/storage/folder-storage.ts";

const folder = mkdtempSync(join(tmpdir(), "shortlight-preview-"));
const files = new FolderStorage(folder);
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const FIXTURE = fileURLToPath(new URL("../../fixtures/extracts/survey-162-columns.csv", import.meta.url));

const preview = async (content: string | Buffer) => {
  const bytes = Buffer.from(content as string);
  await files.write("preview/original", Readable.from([bytes]));
  return previewOf(await readSample(files, "preview/original", bytes.length));
};
const means = async (content: string | Buffer) =>
  Object.fromEntries(
    (await preview(content)).columns
      .filter((c) => c.means !== "kept")
      .map((c) => [c.header, [c.means, c.unit]]),
  );

describe("what columns seem to mean", () => {
  test("a wide survey table is understood by its headers, and its look-alikes are left alone", async () => {
    const found = await preview(readFileSync(FIXTURE));
    expect(found.columns).toHaveLength(162);
    const used = found.columns.filter((c) => c.means !== "kept");
    expect(Object.fromEntries(used.map((c) => [c.header, c.means]))).toEqual({
      source_id: "source_id",
      DESIGNATION: "designation",
      ref_epoch: "epoch",
      ra: "ra",
      dec: "dec",
      parallax: "parallax",
      parallax_error: "parallax_err",
      pmra: "pmra",
      pmra_error: "pmra_err",
      pmdec: "pmdec",
      pmdec_error: "pmdec_err",
      ruwe: "ruwe",
      phot_g_mean_mag: "g_mag",
      phot_bp_mean_mag: "bp_mag",
      phot_rp_mean_mag: "rp_mag",
      teff_gspphot: "teff",
      logg_gspphot: "logg",
      mh_gspphot: "feh",
    });
    expect(found.findings).toEqual([]);
    expect(used[0]?.samples[0]?.value).toBe("6500000000000000123");
  });

  test("units in the header count, and the usual one stands in where there is none", async () => {
    const content =
      "Name,RA_ICRS (deg),DE_ICRS [deg],plx[arcsec],e_Plx (mas),pmRA*,Ks,[Fe/H],log(g)\nA,30,5,0.1,1,5,8,0,4\n";
    expect(await means(content)).toEqual({
      Name: ["designation", ""],
      "RA_ICRS (deg)": ["ra", "deg"],
      "DE_ICRS [deg]": ["dec", "deg"],
      "plx[arcsec]": ["parallax", "arcsec"],
      "e_Plx (mas)": ["parallax_err", "mas"],
      "pmRA*": ["pmra", "mas.yr-1"],
      Ks: ["ks_mag", "mag"],
      "[Fe/H]": ["feh", "dex"],
      "log(g)": ["logg", "dex(cm.s-2)"],
    });
  });

  test("sexagesimal right ascension is in hours", async () => {
    expect((await means("name,ra,dec,epoch\nA,12:30:00,-00:12:14.966,2016\n")).ra).toEqual([
      "ra",
      "hourangle",
    ]);
  });

  test("names given twice are told apart, and the change is said", async () => {
    const found = await preview("ra,dec,ra,,epoch\n100,20,101,5,2016\n");
    expect(found.columns.map((c) => c.header)).toEqual(["ra", "dec", "ra (2)", "column 4", "epoch"]);
    expect(found.findings.map((f) => f.code)).toEqual(["headers-renamed"]);
  });
});

describe("encodings", () => {
  const content = "nom,ra,dec,epoch\nÉtoile,100.5,20.5,2016\n";
  test.each([
    ["UTF-8", Buffer.from(content), "utf-8"],
    ["UTF-8 with a mark", Buffer.from(`\ufeff${content}`), "utf-8"],
    ["UTF-16", Buffer.from(`\ufeff${content}`, "utf16le"), "utf-16le"],
    ["Latin-1", Buffer.from(content, "latin1"), "latin1"],
  ])("%s is read without its mark entering a name", async (_name, bytes, encoding) => {
    const found = await preview(bytes);
    expect(found.encoding).toBe(encoding);
    expect(found.columns[0]).toMatchObject({ header: "nom", samples: [{ text: "Étoile" }] });
  });
});

test("a cut at the end of a large file is found without reading all of it", async () => {
  const row = "1234567,100.123456,20.123456,2016.0,50.5\n";
  const large = `source_id,ra,dec,epoch,plx\n${row.repeat(30_000)}`;
  const codes = async (text: string) => (await preview(text)).findings.map((f) => f.code);
  expect(await codes(large)).toEqual([]);
  expect(await codes(`${large}99,100.1`)).toEqual(["file-cut-off"]);
});
