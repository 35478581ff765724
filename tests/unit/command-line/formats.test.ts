import { describe, expect, test } from "vitest";
import { binaryFile, bytesOf } from "../formats/fits/fits-file.ts";
import { ownFolder, run } from "./support.ts";

const { folder, put } = ownFolder();

const derive = (file: string, ...more: string[]) =>
  run(
    folder,
    "derive",
    file,
    "--card",
    "practice-30",
    "--campaign",
    "practice-180d",
    "--format",
    "csv",
    ...more,
  );

/** The given part of the first star. */
const first = (csv: string): Record<string, string> => {
  const [names = [], values = []] = csv.split("\r\n").map((line) => line.split(","));
  return Object.fromEntries(names.map((name, i) => [name, values[i] ?? ""]));
};

const votable = (info = ""): string => `<?xml version="1.0"?>
<VOTABLE version="1.4" xmlns="http://www.ivoa.net/xml/VOTable/v1.3"><RESOURCE type="results">
<COOSYS ID="c" system="ICRS" epoch="J2015.5"/>
<TABLE>
<FIELD name="source_id" datatype="long" ucd="meta.id;meta.main"/>
<FIELD name="ra" datatype="double" unit="deg" ucd="pos.eq.ra;meta.main" ref="c"/>
<FIELD name="dec" datatype="double" unit="deg" ucd="pos.eq.dec;meta.main" ref="c"/>
<FIELD name="parallax" datatype="double" unit="arcsec" ucd="pos.parallax.trig"/>
<FIELD name="Kmag" datatype="float" unit="mag" ucd="phot.mag;em.IR.K"/>
<DATA><TABLEDATA><TR><TD>3141592653589793239</TD><TD>10.5</TD><TD>-20</TD><TD>0.06</TD><TD>7.5</TD></TR></TABLEDATA></DATA>
</TABLE>${info}</RESOURCE></VOTABLE>
`;

describe("what a file is, is told by its content", () => {
  test("a VOTable, its epoch by its frame", async () => {
    put("named.csv", votable());
    const { code, out } = await derive("named.csv");
    expect(code).toBe(0);
    const star = first(out);
    expect(star).toMatchObject({ source_id: "3141592653589793239", ra: "10.5", dec: "-20", epoch: "2015.5" });
    expect(Number(star.parallax)).toBeCloseTo(60, 10);
    expect(star.ks_mag).toBe("7.5");
  });

  test("a FITS table", async () => {
    const file = binaryFile([
      { name: "source_id", form: "K", cells: [bytesOf.int64(3141592653589793239n)] },
      { name: "parallax", form: "D", keywords: { TUNIT: "mas" }, cells: [bytesOf.float64(60)] },
      { name: "Kmag", form: "E", keywords: { TUNIT: "mag" }, cells: [bytesOf.float32(7.5)] },
    ]);
    put("named.csv", file);
    const { code, out } = await derive("named.csv");
    expect(code).toBe(0);
    expect(first(out)).toMatchObject({ source_id: "3141592653589793239", parallax: "60", ks_mag: "7.5" });
  });

  test("an answer that the service cut is a question, and can be accepted", async () => {
    put("cut.xml", votable('<INFO name="QUERY_STATUS" value="OVERFLOW"/>'));
    const { code, out, err } = await derive("cut.xml");
    expect([code, out]).toEqual([2, ""]);
    expect(err).toMatch(/QUERY_STATUS is OVERFLOW/);
    put("plan.json", err.slice(err.indexOf("  {")));
    const accepted = await derive("cut.xml", "--plan", "plan.json");
    expect(accepted.code).toBe(0);
    expect(accepted.err).toMatch(/rows are missing/);
  });

  test("an answer that is an error stops", async () => {
    put("broken.xml", votable('<INFO name="QUERY_STATUS" value="ERROR">no</INFO>'));
    expect(await derive("broken.xml")).toMatchObject({ code: 1, out: "" });
  });

  test("a page of another kind is no table", async () => {
    put("page.csv", "<!DOCTYPE html><html><body>Not here</body></html>");
    const { code, err } = await derive("page.csv");
    expect(code).toBe(1);
    expect(err).toMatch(/a web page/);
  });
});
