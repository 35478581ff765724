import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { eclipticToIcrs, galacticToIcrs, icrsToEcliptic, icrsToGalactic } from "#shared/science/frames.ts";
import { separation } from "#shared/science/separation.ts";
import { arcsecBetween, latitudes, longitudes, written } from "./positions.ts";

type Turn = (target: Float64Array, longitude: number, latitude: number) => void;

const turned = (turn: Turn, longitude: number, latitude: number): [number, number] => {
  const [l = 0, b = 0] = written(2, (target) => turn(target, longitude, latitude));
  return [l, b];
};

/** Computed with the matrix of ESA 1997, SP-1200, vol. 1, eq. 1.5.11, and an obliquity of 84381.406″. */
const OBJECTS: [string, number, number, number, number, number, number][] = [
  ["Barnard's star", 269.44850252543836, 4.739420051112412, 31.049418, 14.0866037, 269.3764934, 28.1775059],
  ["Sirius", 101.28715533, -16.71611586, 227.2302855, -8.8902824, 104.0816622, -39.6052372],
  ["Vega", 279.23473479, 38.78368896, 67.448203, 19.2372524, 285.3163821, 61.7328534],
  ["HD 209458", 330.79502, 18.88424, 76.7533647, -28.5270499, 340.3542025, 28.7240874],
  ["the origin", 0, 0, 96.3372723, -60.1885533, 0, 0],
];

test.each(OBJECTS)("%s in galactic and ecliptic coordinates", (_, ra, dec, l, b, lambda, beta) => {
  const galactic = turned(icrsToGalactic, ra, dec);
  expect(galactic[0]).toBeCloseTo(l, 6);
  expect(galactic[1]).toBeCloseTo(b, 6);
  const ecliptic = turned(icrsToEcliptic, ra, dec);
  expect(ecliptic[0]).toBeCloseTo(lambda, 6);
  expect(ecliptic[1]).toBeCloseTo(beta, 6);
});

describe("galactic coordinates", () => {
  test("have their centre and pole where they are defined", () => {
    // ESA 1997, SP-1200, vol. 1, 1.5.3: pole 192.85948, 27.12825; the place of the centre is computed by way of FK5.
    const [l, b] = turned(icrsToGalactic, 266.40498829, -28.93617776);
    expect(arcsecBetween(l, 0)).toBeCloseTo(0, 0);
    expect(b).toBeCloseTo(0, 4);
    expect(turned(icrsToGalactic, 192.85948, 27.12825)[1]).toBeCloseTo(90, 9);
    // Galactic longitude of the celestial pole: 32.93192 + 90.
    expect(turned(icrsToGalactic, 0, 90)[0]).toBeCloseTo(122.93192, 9);
  });

  test("the test position of SOFA's icrs2g", () => {
    // SOFA test suite, t_icrs2g, radians.
    const degrees = 180 / Math.PI;
    const [l, b] = turned(icrsToGalactic, 5.933807430222719 * degrees, -1.1784870613579945 * degrees);
    expect(l / degrees).toBeCloseTo(5.585053606381855, 14);
    expect(b / degrees).toBeCloseTo(-0.7853981633974483, 14);
  });
});

describe("ecliptic coordinates", () => {
  test("SOFA's own, which turn by the frame bias too, are 20 to 50 mas away", () => {
    // Computed with SOFA's eqec06 at J2000.0 for Sirius.
    const [longitude, latitude] = turned(icrsToEcliptic, 101.28715533, -16.71611586);
    expect(3600 * separation(longitude, latitude, 104.0816691, -39.6052376)).toBeLessThan(0.05);
  });
});

test.each([
  ["galactic", icrsToGalactic, galacticToIcrs],
  ["ecliptic", icrsToEcliptic, eclipticToIcrs],
])("%s coordinates lead back, keep every distance, and stay within their ranges", (_, there, back) => {
  fc.assert(
    fc.property(longitudes, latitudes, longitudes, latitudes, (ra1, dec1, ra2, dec2) => {
      const a = turned(there, ra1, dec1);
      const b = turned(there, ra2, dec2);
      expect(separation(...a, ...b)).toBeCloseTo(separation(ra1, dec1, ra2, dec2), 11);
      expect(separation(...turned(back, ...a), ra1, dec1)).toBeLessThan(1e-12);
      expect(a[0] >= 0 && a[0] < 360 && Math.abs(a[1]) <= 90).toBe(true);
    }),
  );
});

test("there is no place for a missing or impossible position", () => {
  expect(turned(icrsToGalactic, Number.NaN, 0)).toEqual([Number.NaN, Number.NaN]);
  expect(turned(icrsToEcliptic, 10, Number.NaN)).toEqual([Number.NaN, Number.NaN]);
  expect(turned(icrsToEcliptic, 10, 90.001)).toEqual([Number.NaN, Number.NaN]);
});
