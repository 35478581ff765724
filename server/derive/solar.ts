import { SOLAR_TEFF_K } from "#shared/science/constants.ts";
import type { FormulaConstant } from "./definition.ts";

export const SOLAR_TEMPERATURE: FormulaConstant = {
  symbol: "T_sun",
  value: SOLAR_TEFF_K,
  unit: "K",
  source: "Nominal effective temperature of the Sun, IAU 2015 Resolution B3",
};
