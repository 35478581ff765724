import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  DEEPEST_ORDER,
  nestedCentre,
  nestedPixel,
  pixelOfSourceNumber,
  ringPixel,
} from "#shared/science/healpix.ts";
import { nestedNeighbours, pixelsTouchingDisc } from "#shared/science/healpix-regions.ts";
import { separation } from "#shared/science/separation.ts";
import { latitudes, longitudes, written } from "./positions.ts";

const centreOf = (order: number, pixel: number): [number, number] => {
  const [longitude = 0, latitude = 0] = written(2, (target) => nestedCentre(target, order, pixel));
  return [longitude, latitude];
};

const pixels = fc
  .integer({ min: 0, max: DEEPEST_ORDER })
  .chain((order) => fc.tuple(fc.constant(order), fc.integer({ min: 0, max: 12 * 4 ** order - 1 })));

describe("the pixel of a position", () => {
  /** (45, 45), (120, −60), Barnard's star, HD 209458 and (359.9, −89.9). */
  const POINTS = [
    [45, 45],
    [120, -60],
    [269.44850252543836, 4.739420051112412],
    [330.79502, 18.88424],
    [359.9, -89.9],
  ] as const;

  /** Computed with astropy_healpix 0.6. Points on a corner of pixels are left out: either pixel is right. */
  test.each([
    [0, [0, 9, 7, 3, 11], [0, 9, 7, 3, 11]],
    [1, [3, 36, 31, 12, 44], [0, 45, 18, 19, 47]],
    [3, [48, 587, 496, 197, 704], [87, 714, 360, 269, 767]],
    [6, [3084, 37595, 31781, 12644, 45056], [6873, 45762, 22591, 16747, 49151]],
    [10, [789504, 9624384, 8136035, 3236976, 11534340], [1837923, 11740077, 5772282, 4257460, 12582899]],
    [
      12,
      [12632064, 153990155, 130176568, 51791627, 184549440],
      [29470083, 187836042, 92360679, 68082383, 201326447],
    ],
  ])("at order %d, nested and by rings", (order, nested, ring) => {
    expect(POINTS.map(([longitude, latitude]) => nestedPixel(order, longitude, latitude))).toEqual(nested);
    expect(POINTS.map(([longitude, latitude]) => ringPixel(order, longitude, latitude))).toEqual(ring);
  });

  test("of a pixel's centre is that pixel, at every order", () => {
    fc.assert(
      fc.property(pixels, ([order, pixel]) => {
        const [longitude, latitude] = centreOf(order, pixel);
        expect(nestedPixel(order, longitude, latitude)).toBe(pixel);
        expect(ringPixel(order, longitude, latitude)).toBeLessThan(12 * 4 ** order);
      }),
    );
  });

  test("lies within the pixel of the order above", () => {
    fc.assert(
      fc.property(longitudes, latitudes, fc.integer({ min: 1, max: 20 }), (longitude, latitude, order) => {
        const pixel = nestedPixel(order, longitude, latitude);
        expect(Math.floor(pixel / 4)).toBe(nestedPixel(order - 1, longitude, latitude));
        expect(nestedPixel(order, longitude + 360, latitude)).toSatisfy(
          (other: number) => other === pixel || nestedNeighbours(order, pixel).includes(other),
        );
      }),
    );
  });

  test("every ring index is used once", () => {
    for (const order of [0, 1, 2, 4]) {
      const count = 12 * 4 ** order;
      const rings = Array.from({ length: count }, (_, pixel) => ringPixel(order, ...centreOf(order, pixel)));
      expect(rings.toSorted((a, b) => a - b)).toEqual(Array.from({ length: count }, (_, ring) => ring));
    }
  });

  test("is missing where there is no order or position", () => {
    expect(nestedPixel(DEEPEST_ORDER + 1, 0, 0)).toBeNaN();
    expect(nestedPixel(1.5, 0, 0)).toBeNaN();
    expect(ringPixel(-1, 0, 0)).toBeNaN();
    expect(ringPixel(3, 0, 90.5)).toBeNaN();
    expect(nestedPixel(3, Number.NaN, 0)).toBeNaN();
    expect(centreOf(3, 768)).toEqual([Number.NaN, Number.NaN]);
  });
});

describe("the pixel in a source number", () => {
  test("of Barnard's star is that of its place in J2000, not of 2016", () => {
    // The number is of Gaia DR3; the pixels are computed.
    expect(pixelOfSourceNumber("4472832130942575872")).toBe(130176548);
    expect(nestedPixel(12, 269.4520734281, 4.6934104585)).toBe(130176548);
    expect(nestedPixel(12, 269.44850252543836, 4.739420051112412)).toBe(130176568);
  });

  test("is missing for what is no such number", () => {
    for (const id of ["", "Gaia DR3 4472832130942575872", "-1", "1.5", "9999999999999999999"])
      expect(pixelOfSourceNumber(id)).toBeNaN();
  });
});

describe("the neighbours of a pixel", () => {
  test("have it as theirs", () => {
    fc.assert(
      fc.property(pixels, ([order, pixel]) => {
        const neighbours = nestedNeighbours(order, pixel);
        expect(new Set(neighbours).size).toBe(neighbours.length);
        for (const neighbour of neighbours) expect(nestedNeighbours(order, neighbour)).toContain(pixel);
      }),
    );
  });

  test("are seven at the eight corners where three faces meet, else eight", () => {
    const order = 3;
    const counts = Array.from({ length: 768 }, (_, pixel) => nestedNeighbours(order, pixel).length);
    expect(counts.filter((count) => count === 7)).toHaveLength(24);
    expect(counts.filter((count) => count === 8)).toHaveLength(744);
    expect(nestedNeighbours(order, 768)).toEqual([]);
  });
});

describe("the pixels that a disc touches", () => {
  test("hold every position within it", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 14 }),
        longitudes,
        latitudes,
        fc.double({ min: 0, max: 3, noNaN: true }),
        longitudes,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (order, longitude, latitude, widths, direction, part) => {
          const radius = (widths * 58.6) / 2 ** order;
          fc.pre(radius < 60);
          const [l, b] = offset(longitude, latitude, direction, radius * part);
          fc.pre(separation(longitude, latitude, l, b) <= radius);
          expect(pixelsTouchingDisc(order, longitude, latitude, radius)).toContain(nestedPixel(order, l, b));
        },
      ),
    );
  });

  test("are few for a small disc, and rise", () => {
    const touched = pixelsTouchingDisc(12, 10, 20, 2 / 3600);
    expect(touched.length).toBeLessThanOrEqual(9);
    expect(touched).toEqual(touched.toSorted((a, b) => a - b));
    expect(touched).toContain(nestedPixel(12, 10, 20));
    expect(pixelsTouchingDisc(2, 0, 0, 180)).toHaveLength(192);
  });

  test("are none for a disc that is none", () => {
    expect(pixelsTouchingDisc(3, 0, 0, -1)).toEqual([]);
    expect(pixelsTouchingDisc(3, 0, 91, 1)).toEqual([]);
    expect(pixelsTouchingDisc(25, 0, 0, 1)).toEqual([]);
  });
});

/** The position a distance away in a direction, from north through east; all in degrees. */
const offset = (
  longitude: number,
  latitude: number,
  direction: number,
  distance: number,
): [number, number] => {
  const radians = Math.PI / 180;
  const [b, a, d] = [latitude * radians, direction * radians, distance * radians];
  const sine = Math.sin(b) * Math.cos(d) + Math.cos(b) * Math.sin(d) * Math.cos(a);
  const east = Math.sin(a) * Math.sin(d) * Math.cos(b);
  const north = Math.cos(d) - Math.sin(b) * sine;
  return [
    (((longitude + Math.atan2(east, north) / radians) % 360) + 360) % 360,
    Math.asin(Math.min(1, Math.max(-1, sine))) / radians,
  ];
};
