import { describe, expect, test } from "vitest";
import { countInCells } from "#server/lists/sky.ts";
import { hammer, meridian, parallel } from "#src/lib/projection.ts";

describe("stars counted in cells", () => {
  test("are all counted, the poles and the meridian of zero too", () => {
    const points: [number, number][] = [
      [0, 90],
      [0, -90],
      [359.999, 0],
      [0.5, 0.1],
      [0.5, 0.1],
      [-1, 12],
    ];
    const cells = countInCells(points);
    expect(cells.reduce((sum, [, , stars]) => sum + stars, 0)).toBe(points.length);
    for (const [ra, dec] of cells) {
      expect(ra).toBeGreaterThan(0);
      expect(ra).toBeLessThan(360);
      expect(Math.abs(dec)).toBeLessThan(90);
    }
    expect(cells.find(([, , stars]) => stars === 2)?.[0]).toBeCloseTo(1.5, 9);
  });

  test("lie in cells of one area: an even sky fills them evenly", () => {
    const points: [number, number][] = [];
    for (let i = 0; i < 120; i++)
      for (let j = 0; j < 60; j++)
        points.push([3 * i + 1, (Math.asin((2 * (j + 0.4)) / 60 - 1) * 180) / Math.PI]);
    const cells = countInCells(points);
    expect(cells).toHaveLength(7200);
    expect(new Set(cells.map(([, , stars]) => stars))).toEqual(new Set([1]));
  });
});

describe("the map of the whole sky", () => {
  test("has the poles above and below, and right ascension growing to the left", () => {
    expect(hammer(180, 90)[1]).toBeCloseTo(1, 12);
    expect(hammer(180, -90)[1]).toBeCloseTo(-1, 12);
    expect(hammer(180, 0)).toEqual([-0, 0]);
    expect(hammer(200, 0)[0]).toBeLessThan(hammer(160, 0)[0]);
    expect(hammer(359.9999, 0)[0]).toBeCloseTo(-2, 3);
    expect(hammer(0.0001, 0)[0]).toBeCloseTo(2, 3);
  });

  test("keeps areas: a small square covers the same paper anywhere", () => {
    const areaAt = (ra: number, dec: number): number => {
      const step = 0.01;
      const [x0, y0] = hammer(ra, dec);
      const [x1, y1] = hammer(ra + step, dec);
      const [x2, y2] = hammer(ra, dec + step);
      const paper = Math.abs((x1 - x0) * (y2 - y0) - (x2 - x0) * (y1 - y0));
      return paper / (step * step * Math.cos((dec * Math.PI) / 180));
    };
    const middle = areaAt(180, 0);
    for (const [ra, dec] of [
      [30, 10],
      [300, -55],
      [200, 80],
      [90, 40],
    ] as const)
      expect(areaAt(ra, dec) / middle).toBeCloseTo(1, 3);
  });

  test("draws its net within the ellipse, each line without a jump", () => {
    for (const line of [...[-60, 0, 60].map(parallel), ...[60, 180, 300].map(meridian)]) {
      for (const [x, y] of line) expect((x * x) / 4 + y * y).toBeLessThanOrEqual(1 + 1e-9);
      for (let i = 1; i < line.length; i++) {
        const [a, b] = [line[i - 1] ?? [0, 0], line[i] ?? [0, 0]];
        expect(Math.hypot(a[0] - b[0], a[1] - b[1])).toBeLessThan(0.2);
      }
    }
  });
});
