import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { positionAngle, separation } from "#shared/science/separation.ts";
import { arcsecBetween, latitudes, longitudes } from "./positions.ts";

describe("the separation", () => {
  test("of Arcturus and Spica is 32.7930°", () => {
    // Meeus 1998, Astronomical Algorithms, 2nd ed., example 17.a; the further digits are computed.
    expect(separation(213.9154, 19.1825, 201.2983, -11.1614)).toBeCloseTo(32.793, 4);
    expect(separation(213.9154, 19.1825, 201.2983, -11.1614)).toBeCloseTo(32.7930268, 6);
  });

  test("of SOFA's test positions is 2.346722016996999 rad", () => {
    // SOFA test suite, t_seps.
    const degrees = 180 / Math.PI;
    // Its second declination, −3 rad, lies beyond the pole: the direction is that of 3 rad − 180° on the far side.
    expect(separation(degrees, 0.1 * degrees, 0.2 * degrees + 180, 3 * degrees - 180) / degrees).toBeCloseTo(
      2.3467220169969987,
      14,
    );
  });

  test("keeps its digits when small, and when nearly half a turn", () => {
    // Computed.
    expect(separation(0, 45, 180, -45.0000001)).toBeCloseTo(179.9999999, 10);
    expect(separation(359.9999, 0, 0.0001, 0)).toBeCloseTo(0.0002, 12);
    expect(separation(0, 90, 180, 90)).toBeCloseTo(0, 13);
    expect(3.6e6 * separation(10, 20, 10, 20 + 1 / 3.6e6)).toBeCloseTo(1, 6);
  });

  test("is the same both ways, nothing to itself, and the rest of half a turn to the antipode", () => {
    fc.assert(
      fc.property(longitudes, latitudes, longitudes, latitudes, (ra1, dec1, ra2, dec2) => {
        const angle = separation(ra1, dec1, ra2, dec2);
        expect(angle).toBeCloseTo(separation(ra2, dec2, ra1, dec1), 12);
        expect(separation(ra1, dec1, ra1, dec1)).toBeLessThan(1e-13);
        expect(separation(ra1, dec1, ra2 + 180, -dec2)).toBeCloseTo(180 - angle, 11);
        expect(separation(ra1 + 360, dec1, ra2, dec2)).toBeCloseTo(angle, 11);
      }),
    );
  });

  test("is missing without a position", () => {
    expect(separation(Number.NaN, 0, 0, 0)).toBeNaN();
    expect(separation(0, 0, 0, 91)).toBeNaN();
  });
});

describe("the position angle", () => {
  test("counts from north through east", () => {
    expect(positionAngle(10, 0, 10, 1)).toBeCloseTo(0, 12);
    expect(positionAngle(359.5, 0, 0.5, 0)).toBeCloseTo(90, 12);
    expect(positionAngle(10, 0, 10, -1)).toBeCloseTo(180, 12);
    expect(positionAngle(0.5, 0, 359.5, 0)).toBeCloseTo(270, 12);
    // SOFA test suite, t_pas: (1, 0.1) to (0.2, −1) rad is −2.7245449229322704 rad.
    const degrees = 180 / Math.PI;
    const angle = positionAngle(degrees, 0.1 * degrees, 0.2 * degrees, -degrees);
    expect(angle / degrees - 2 * Math.PI).toBeCloseTo(-2.7245449229322705, 14);
  });

  test("with the separation leads to the second position", () => {
    fc.assert(
      fc.property(longitudes, latitudes, longitudes, latitudes, (ra1, dec1, ra2, dec2) => {
        const rho = separation(ra1, dec1, ra2, dec2);
        fc.pre(rho > 1e-6 && rho < 179.999999 && Math.abs(dec1) < 89.9 && Math.abs(dec2) < 89.9);
        const radians = Math.PI / 180;
        const angle = positionAngle(ra1, dec1, ra2, dec2) * radians;
        const sine =
          Math.sin(dec1 * radians) * Math.cos(rho * radians) +
          Math.cos(dec1 * radians) * Math.sin(rho * radians) * Math.cos(angle);
        expect(sine).toBeCloseTo(Math.sin(dec2 * radians), 9);
        expect(Math.sin(rho * radians) * Math.sin(angle)).toBeCloseTo(
          Math.cos(dec2 * radians) * Math.sin(arcsecBetween(ra2, ra1) * (radians / 3600)),
          9,
        );
      }),
    );
  });
});
