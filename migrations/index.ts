import { CreateFirstSchema1796120437441 } from "./1796120437441-create-first-schema.ts";
import { CountAttempts1796121600000 } from "./1796121600000-count-attempts.ts";
import { ProtectLogbook1796121700000 } from "./1796121700000-protect-logbook.ts";
import { KeepRecipes1796121800000 } from "./1796121800000-keep-recipes.ts";
import { TakeInDustAndDistance1796121900000 } from "./1796121900000-take-in-dust-and-distance.ts";
import { KeepReadingPlans1796122000000 } from "./1796122000000-keep-reading-plans.ts";
import { KeepCompanions1796122100000 } from "./1796122100000-keep-companions.ts";
import { KeepColumnHealth1796122200000 } from "./1796122200000-keep-column-health.ts";

/** In order; a test holds this list to the folder. */
export const MIGRATIONS = [
  CreateFirstSchema1796120437441,
  CountAttempts1796121600000,
  ProtectLogbook1796121700000,
  KeepRecipes1796121800000,
  TakeInDustAndDistance1796121900000,
  KeepReadingPlans1796122000000,
  KeepCompanions1796122100000,
  KeepColumnHealth1796122200000,
];
