import { CreateFirstSchema1796120437441 } from "./1796120437441-create-first-schema.ts";

/** In order; a test holds this list to the folder. */
export const MIGRATIONS = [CreateFirstSchema1796120437441];
