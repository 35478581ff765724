import { describe, expect, test } from "vitest";
import { contradicts } from "#server/extracts/ucd.ts";
import { COLUMNS, type Column } from "#shared/catalogue/columns.ts";

describe("whether a UCD contradicts a name", () => {
  test("no column of the registry contradicts itself, nor does its error", () => {
    for (const { key, ucd, hasError } of COLUMNS as readonly Column[]) {
      expect([key, contradicts(ucd, key)]).toEqual([key, false]);
      if (hasError) expect([key, contradicts(`stat.error;${ucd}`, `${key}_err`)]).toEqual([key, false]);
    }
  });

  test.each([
    ["pos.eq.dec", "ra"],
    ["phot.mag;em.IR.J", "h_mag"],
    ["stat.error;pos.parallax.trig", "parallax"],
    ["pos.parallax.trig", "parallax_err"],
    ["stat.error;phot.mag;em.IR.K", "parallax_err"],
    ["phys.size.radius", "teff"],
  ])("%s says something else than %s", (ucd, means) => {
    expect(contradicts(ucd, means)).toBe(true);
  });

  test.each([
    ["", "ra"],
    ["POS_EQ_RA_MAIN", "dec"],
    ["phot.mag", "ks_mag"],
    ["phot.mag;em.opt", "v_mag"],
    ["phys.temperature", "teff"],
    ["stat.error", "teff_err"],
    ["pos.parallax", "parallax"],
    ["phys.abund.Z", "feh"],
    ["meta.code", "ruwe"],
  ])("%s says nothing against %s", (ucd, means) => {
    expect(contradicts(ucd, means)).toBe(false);
  });
});
