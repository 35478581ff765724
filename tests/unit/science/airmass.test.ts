import { expect, test } from "vitest";
import { airmassKastenYoung, airmassPickering } from "#shared/science/airmass.ts";

/** Computed from Kasten & Young 1989, Appl. Opt. 28, 4735 and Pickering 2002, DIO 12, 1: zenith distance, airmasses. */
test.each([
  [0, 0.99971, 1],
  [30, 1.15399, 1.15406],
  [45, 1.4126, 1.41237],
  [60, 1.99429, 1.99315],
  [70, 2.90315, 2.90014],
  [75, 3.81291, 3.80817],
  [80, 5.58604, 5.58074],
  [85, 10.30579, 10.33371],
  [88, 19.43325, 19.64265],
  [90, 37.91961, 38.7494],
])("at a zenith distance of %d°", (zenithDistance, kastenYoung, pickering) => {
  expect(airmassKastenYoung(90 - zenithDistance)).toBeCloseTo(kastenYoung, 5);
  expect(airmassPickering(90 - zenithDistance)).toBeCloseTo(pickering, 5);
});

test("there is none below the horizon", () => {
  for (const airmass of [airmassKastenYoung, airmassPickering])
    for (const altitude of [-0.001, 90.001, Number.NaN]) expect(airmass(altitude)).toBeNaN();
});
