import { BRIGHTNESS_DEFINITIONS } from "./brightness.ts";
import type { DefinitionOf } from "./definition.ts";
import { HABITABILITY_DEFINITIONS } from "./habitability.ts";
import { LUMINOSITY_DEFINITIONS } from "./luminosity.ts";
import { MASS_DEFINITIONS } from "./mass.ts";
import { RADIUS_DEFINITIONS } from "./radius.ts";
import type { StellarKey } from "./star-columns.ts";
import type { StepKey } from "./symbols.ts";
import { TEMPERATURE_DEFINITIONS } from "./temperature.ts";

/** How each stellar quantity, and each step on the way to one, is defined. */
export const STELLAR_DEFINITIONS: Readonly<Record<StellarKey | StepKey, DefinitionOf>> = {
  ...BRIGHTNESS_DEFINITIONS,
  ...TEMPERATURE_DEFINITIONS,
  ...LUMINOSITY_DEFINITIONS,
  ...RADIUS_DEFINITIONS,
  ...MASS_DEFINITIONS,
  ...HABITABILITY_DEFINITIONS,
};
