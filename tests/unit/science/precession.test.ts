import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { julianDateOfEpoch } from "#shared/science/epoch.ts";
import { eclipticToEquatorial, equatorialToEcliptic } from "#shared/science/frames.ts";
import { meanObliquity } from "#shared/science/obliquity.ts";
import { dateToIcrs, generalPrecession, icrsToDate } from "#shared/science/precession.ts";
import { separation } from "#shared/science/separation.ts";
import { latitudes, longitudes, written } from "./positions.ts";

const RADIANS = Math.PI / 180;

describe("the obliquity", () => {
  test("of SOFA's test date", () => {
    // SOFA test suite, t_obl06: 0.4090749229387258204 rad on JD 2454388.5.
    expect(meanObliquity(2_454_388.5) * RADIANS).toBeCloseTo(0.4090749229387258, 14);
    // SOFA test suite, t_obl80: the older 0.4090751347643816218 rad is 0.044″ more.
    expect((0.4090751347643816 / RADIANS - meanObliquity(2_454_388.5)) * 3600).toBeCloseTo(0.044, 3);
  });

  test("of J2026.0 is 23.435896795°", () => {
    // Computed.
    expect(meanObliquity(julianDateOfEpoch(2026))).toBeCloseTo(23.435896795, 9);
  });
});

describe("ecliptic coordinates of date", () => {
  // SOFA test suite, t_eqec06 and t_eceq06, radians. They count the frame bias, 0.023″, and nothing else that is left out.
  const BIAS_ARCSEC = 0.025;

  test("of SOFA's test position", () => {
    const date = 2_440_000.5 + 1234.5;
    const [ra = 0, dec = 0] = written(2, (target) =>
      icrsToDate(target, 1.234 / RADIANS, 0.987 / RADIANS, date),
    );
    const [longitude = 0, latitude = 0] = written(2, (target) =>
      equatorialToEcliptic(target, ra, dec, meanObliquity(date)),
    );
    expect(
      3600 * separation(longitude, latitude, 1.3425099189946545 / RADIANS, 0.5926215259704608 / RADIANS),
    ).toBeLessThan(BIAS_ARCSEC);
  });

  test("of SOFA's test position, back among the stars", () => {
    const date = 2_456_165.901182685;
    const [ra = 0, dec = 0] = written(2, (target) =>
      eclipticToEquatorial(target, 5.1 / RADIANS, -0.9 / RADIANS, meanObliquity(date)),
    );
    const [icrsRa = 0, icrsDec = 0] = written(2, (target) => dateToIcrs(target, ra, dec, date));
    expect(
      3600 * separation(icrsRa, icrsDec, 5.533459733613628 / RADIANS, -1.2465429325544806 / RADIANS),
    ).toBeLessThan(BIAS_ARCSEC);
  });
});

describe("precession", () => {
  const years = fc.double({ min: 1800, max: 2200, noNaN: true });

  test("moves longitudes by 1.397° a century", () => {
    // Capitaine et al. 2003, A&A 412, 567: 5028.796195″ in the first century, and 1.1054348″ more.
    expect(3600 * generalPrecession(julianDateOfEpoch(2100))).toBeCloseTo(5029.9016, 3);
    expect(generalPrecession(2_451_545)).toBe(0);
  });

  test("brings θ Persei to its place of 2028.87", () => {
    // Meeus 1998, Astronomical Algorithms, 2nd ed., example 21.b: from 41.054063, +49.227750 (with its motion) to
    // 41.547214, +49.348483, by IAU 1976, which differs by 0.09″ then.
    const [ra = 0, dec = 0] = written(2, (target) => icrsToDate(target, 41.054063, 49.22775, 2_462_088.69));
    expect(3600 * separation(ra, dec, 41.547214, 49.348483)).toBeLessThan(0.15);
  });

  test("leads back, and keeps every distance", () => {
    fc.assert(
      fc.property(longitudes, latitudes, longitudes, latitudes, years, (ra1, dec1, ra2, dec2, year) => {
        const date = julianDateOfEpoch(year);
        const [a = 0, b = 0] = written(2, (target) => icrsToDate(target, ra1, dec1, date));
        const [c = 0, d = 0] = written(2, (target) => icrsToDate(target, ra2, dec2, date));
        expect(separation(a, b, c, d)).toBeCloseTo(separation(ra1, dec1, ra2, dec2), 10);
        const [ra = 0, dec = 0] = written(2, (target) => dateToIcrs(target, a, b, date));
        expect(separation(ra, dec, ra1, dec1)).toBeLessThan(1e-11);
      }),
    );
  });

  test("has no place for an impossible declination", () => {
    expect(written(2, (target) => icrsToDate(target, 10, -91, 2_460_000))).toEqual([Number.NaN, Number.NaN]);
  });
});
