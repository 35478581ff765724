import type { ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { median } from "./findings/look.ts";
import type { Sample } from "./sample.ts";

/** The middle of the sizes of a column's numbers as the file has them, by header. */
export type PlanProfile = Readonly<Record<string, number>>;

/** Sizes below this are noise around zero. */
const LEAST_VALUES = 5;

/** What the used columns of a file hold, so that a later file with the same header can be compared. */
export const profileOf = (sample: Sample, plan: Pick<ReadingPlan, "columns">): PlanProfile =>
  Object.fromEntries(
    plan.columns.flatMap(({ header, index, means }) => {
      const values = means === KEPT ? [] : [...(sample.columns[index]?.values ?? [])];
      const sizes = values.filter((v) => Number.isFinite(v) && v !== 0).map(Math.abs);
      return sizes.length >= LEAST_VALUES ? [[header, median(sizes)] as const] : [];
    }),
  );
