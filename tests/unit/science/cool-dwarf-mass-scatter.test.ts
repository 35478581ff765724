import { expect, test } from "vitest";
import { massScatter } from "#shared/science/cool-dwarf-mass-scatter.ts";

/** The table of the authors of Mann et al. 2019, in percent; what lies between is computed. */
test.each([
  [4, 3.6],
  [4.25, 3],
  [4.5, 2.4],
  [5, 2.4],
  [5.5, 2.3],
  [6, 2.1],
  [7.3, 2.1],
  [8.5, 2.1],
  [9, 2.2],
  [9.5, 2.3],
  [10, 2.5],
  [10.5, 2.5],
  [10.75, 2.85],
  [11, 3.2],
])("scatter of the mass at M Ks %d is %d percent", (absKs, percent) => {
  expect(massScatter(absKs)).toBeCloseTo(percent / 100, 12);
});

test("outside M Ks 4 to 11 there is none", () => {
  for (const absKs of [3.99, 11.01, Number.NaN]) expect(massScatter(absKs)).toBeNaN();
});
