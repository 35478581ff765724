import { describe, expect, test } from "vitest";
import { readUnit } from "#shared/units/read-unit.ts";
import { conversionTo, systemInUnit } from "#shared/units/units.ts";

/**
 * Spellings by what they convert to, in the words of VOUnit 1.1, of the Standards for Astronomical Catalogues 2.0, of FITS
 * 4.0 and of common practice. After the colon: the factor, and an offset where there is one.
 */
const SPELLINGS: Readonly<Record<string, readonly string[]>> = {
  "deg: 1": ["deg", "DEGREE", "degrees", "Degrees", "degs", "°", "º", "[deg]", "d:m:s", '"d:m:s"', "dms"],
  "deg: 15": ["h", "hr", "hour", "hours", "HOURANGLE", "hms", "h:m:s", '"h:m:s"', "hh:mm:ss", "h m s"],
  "deg: 0.016666666666666666": ["arcmin", "'", "′", "arcminutes", "ARCMIN"],
  "deg: 0.0002777777777777778": ["arcsec", '"', "″", "as", "arcseconds", "arcs", "asec", "arc sec"],
  "deg: 57.29577951308232": ["rad", "radian", "RADIANS"],
  "mas: 1": [
    "mas",
    "MAS",
    "milliarcsec",
    "milliarcsecond",
    "milli-arcsec",
    "milli arcsecond",
    "marcsec",
    "[mas]",
    "(mas)",
    "10-3arcsec",
    "0.001arcsec",
    "10**-3 arcsec",
  ],
  "mas: 1000": ["arcsec", "as", "ARCSEC", '"', "arc seconds"],
  "mas: 0.001": ["uas", "µas", "μas", "microarcsec", "micro-arcsec", "uarcsec", "µarcsec"],
  "mas.yr-1: 1": [
    "mas.yr-1",
    "mas/yr",
    "mas yr-1",
    "mas yr^-1",
    "mas yr**-1",
    "mas*yr**(-1)",
    "mas / yr",
    "mas/a",
    "mas.a-1",
    "mas/year",
    "MAS/YR",
    "mas yr⁻¹",
    "mas yr−1",
    "mas·yr^{-1}",
    "mas yr$^{-1}$",
    "milliarcsec per year",
    "milliarcseconds/year",
    "mas/Julian year",
    "Angle[mas]/Time[Julian years]",
    "[mas/yr]",
    "mas/(yr)",
  ],
  "mas.yr-1: 1000": ["arcsec/yr", "arcsec.yr-1", '"/yr', "arcsec per year", "as/a", "arcsec yr**-1"],
  "mas.yr-1: 0.001": ["uas/yr", "µas/yr", "μas.yr-1", "microarcsec/yr"],
  "mas.yr-1: 10": ["arcsec/cy", "arcsec/century", "arcsec.cy-1"],
  "pc: 1": ["pc", "parsec", "Parsecs", "PC"],
  "pc: 1000": ["kpc", "KPC", "kiloparsec", "10+3pc", "1000 pc"],
  "K: 1": ["K", "Kelvin", "KELVIN", "k", "degK"],
  "K: 1000": ["kK", "10+3K", "10**3 K", "10^3 K", "1000K", "10^{3} K"],
  "mag: 1": ["mag", "MAG", "mags", "magnitude", "[mag]", "mag(Vega)", "Vegamag", "mag (Vega)"],
  "mag: 0.001": ["mmag", "millimag", "10-3mag"],
  "dex(cm.s-2): 1": [
    "dex(cm.s-2)",
    "log(cm.s**-2)",
    "log(cm/s2)",
    "log(cm.s-2)",
    "[cm/s2]",
    "[cm.s-2]",
    "log10(cm s-2)",
    "log(cgs)",
    "log.cm.s**-2",
    "cgs",
    "cm/s2",
    "cm.s-2",
    "cm/s**2",
    "dex",
    "log cm s^-2",
  ],
  "dex(cm.s-2): 1 + 2": ["dex(m.s-2)", "log(m/s2)", "[m/s2]", "log(SI)"],
  "dex: 1": ["dex", "[-]", "[Sun]", "DEX", "log(Sun)", "dex(solar)", "-", "---", "solar", "log", "[]"],
  "yr: 1": ["yr", "year", "Years", "a", "Jyear", "julian year"],
  ": 1": ["", "-", "---", "1", "none", "unitless", "dimensionless"],
  ": 0.01": ["%", "percent"],
};

const CASES = Object.entries(SPELLINGS).flatMap(([way, list]) => {
  const [unit = "", numbers = ""] = way.split(": ");
  const canonical = way.startsWith(": ") ? "" : unit;
  const [factor, offset = "0"] = (way.startsWith(": ") ? way.slice(2) : numbers).split(" + ");
  return list.map((spelling) => [spelling, canonical, Number(factor), Number(offset)] as const);
});

describe("spellings of units", () => {
  test.each(CASES)("%j leads to %j by × %d + %d", (spelling, canonical, factor, offset) => {
    const way = conversionTo(canonical, spelling);
    expect(way).toBeDefined();
    expect(way?.factor).toBeCloseTo(factor, 12);
    expect(way?.offset).toBeCloseTo(offset, 9);
  });

  test("are many", () => expect(CASES.length).toBeGreaterThan(150));

  test.each([
    ["solRad", "solarRadius"],
    ["Rsun", "solarRadius"],
    ["R☉", "solarRadius"],
    ["solMass", "solarMass"],
    ["M_sun", "solarMass"],
    ["solLum", "solarLuminosity"],
    ["km/s", "length time-1"],
    ["km.s-1", "length time-1"],
    ["Jy", "flux"],
    ["mJy", "flux"],
    ["erg.s-1.cm-2", "energy length-2 time-1"],
    ["e-/s", "count time-1"],
    ["Gyr", "time"],
    ["solMass.solRad-3", "solarMass solarRadius-3"],
    ["um", "length"],
    ["Angstrom", "length"],
    ["mag.arcsec-2", "angle-2 magnitude"],
    ["ppm", ""],
  ])("%s is known as %s, though no column is kept in it", (spelling, dimension) =>
    expect(readUnit(spelling)?.dimension).toBe(dimension),
  );

  test.each([
    "furlong",
    "mass",
    "mas/yr/",
    "mas//yr",
    "log(",
    "constructor",
    "mas.yr-",
    "see note",
    "[K",
    "",
    "/",
    "10",
    "µ",
  ])("%j is not guessed at", (spelling) => {
    for (const canonical of ["deg", "mas", "mas.yr-1", "pc", "K", "mag", "yr"])
      expect(conversionTo(canonical, spelling)).toBeUndefined();
  });

  test("a logarithm is never taken for the number, nor a number of days for a date", () => {
    expect(conversionTo("K", "[K]")).toBeUndefined();
    expect(conversionTo("K", "log(K)")).toBeUndefined();
    expect(conversionTo("pc", "log(pc)")).toBeUndefined();
    expect(conversionTo("yr", "d")).toBeUndefined();
    expect(conversionTo("yr", "h")).toBeUndefined();
  });

  test("a zero point named by the unit is told", () => {
    for (const spelling of ["mag(AB)", "ABmag", "mag (AB)", "[mag_AB]"])
      expect(systemInUnit(spelling)).toBe("ab");
    for (const spelling of ["mag(Vega)", "VegaMag"]) expect(systemInUnit(spelling)).toBe("vega");
    expect(systemInUnit("mag")).toBeNull();
    expect(conversionTo("mag", "mag(AB)")).toBeUndefined();
  });
});
