import { centuriesFromJ2000 } from "./epoch.ts";

/**
 * Mean obliquity of the ecliptic of date, degrees (IAU 2006).
 *
 * @param julianDate TT; within a few thousand years of J2000.0, where the error of the polynomial is far below 1″
 * @see Capitaine, Wallace & Chapront 2003, A&A 412, 567, eq. 37 with the constant term of eq. 39
 */
export const meanObliquity = (julianDate: number): number => {
  const t = centuriesFromJ2000(julianDate);
  const seconds =
    84_381.406 + t * (-46.836769 + t * (-0.0001831 + t * (0.0020034 + t * (-5.76e-7 - 4.34e-8 * t))));
  return seconds / 3600;
};
