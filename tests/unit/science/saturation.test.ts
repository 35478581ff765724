import { describe, expect, test } from "vitest";
import { electronRate } from "#shared/science/passbands.ts";
import { BESSELL_1998, photonBandOf } from "#shared/science/photometric-systems.ts";
import { centralPixelShare, fillingMagnitude, pixelCapacity } from "#shared/science/saturation.ts";

describe("saturation", () => {
  /** Computed from the error function. */
  test.each([
    [1.5, 0.32207],
    [2, 0.19708],
    [2.5, 0.13129],
    [3, 0.0932],
    [4, 0.0536],
  ])("an image %d pixels wide puts %d on its central pixel", (fwhm, share) => {
    expect(centralPixelShare(fwhm)).toBeCloseTo(share, 5);
  });

  test("a point puts all of its light there, and no image is narrower", () => {
    expect(centralPixelShare(0.01)).toBeCloseTo(1, 12);
    for (const fwhm of [0, -1, Number.NaN]) expect(centralPixelShare(fwhm)).toBeNaN();
  });

  /** Computed for V, 880 Å, throughput 0.5, full well 1e5 electrons: aperture, exposure, width, magnitude. */
  test.each([
    [0.2, 60, 2, 10.529],
    [0.5, 10, 2.5, 10.133],
    [1, 1, 3, 8.766],
  ])("%d m, %d s, %d px saturates at V = %d", (aperture, seconds, fwhm, magnitude) => {
    const zero = electronRate(0, photonBandOf("V", BESSELL_1998.V, 880), aperture, 0, 0.5, 0) * seconds;
    expect(fillingMagnitude(zero, centralPixelShare(fwhm), 0, 1e5)).toBeCloseTo(magnitude, 3);
  });

  test("the converter limits where it ends before the well is full", () => {
    expect(pixelCapacity(1e5)).toBe(1e5);
    expect(pixelCapacity(1e5, 65_535)).toBe(65_535);
    expect(pixelCapacity(1e5, 65_535, 1.5)).toBe(65_535 * 1.5);
    expect(pixelCapacity(1e5, 65_535, 2)).toBe(1e5);
  });

  test("sky takes room away; a sky that fills the pixel leaves none", () => {
    expect(fillingMagnitude(1e9, 0.2, 5e4, 1e5)).toBeCloseTo(
      fillingMagnitude(1e9, 0.2, 0, 1e5) + 2.5 * Math.log10(2),
      12,
    );
    expect(fillingMagnitude(1e9, 0.2, 1e5, 1e5)).toBeNaN();
  });
});
