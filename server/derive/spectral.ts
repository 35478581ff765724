import { SPECTRAL_ZERO_POINT } from "#shared/science/sunlike.ts";
import { sum, term } from "./formula-text.ts";

/** The seven terms in temperature, gravity and iron that mass and radius of stars like the Sun share. */
export const spectralFormula = (
  c: readonly [number, number, number, number, number, number, number],
): string => {
  const x = `(log10(T_eff) - ${SPECTRAL_ZERO_POINT})`;
  return `10^(${sum(
    ...[term(c[0]), term(c[1], x), term(c[2], `${x}^2`), term(c[3], `${x}^3`)],
    ...[term(c[4], "logg^2"), term(c[5], "logg^3"), term(c[6], "FeH")],
  )})`;
};
