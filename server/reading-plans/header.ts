import type { ReadingPlan } from "#shared/api/extracts.ts";
import { contentHash } from "../recipes/content-hash.ts";

/** Names of the columns in their order: files with the same hash ask the same questions. */
export const headerHash = (header: readonly string[]): string => contentHash(header);

export const headerOf = (plan: Pick<ReadingPlan, "columns">): string[] => plan.columns.map((c) => c.header);

/** Answers that hold for every file of a kind. Others are about the one file: its rows, its values, its cut. */
const OF_ANY_FILE =
  /^(?:meaning-doubtful|j2000-doubt|unit-doubt|decimal-mark|delimiter-doubt|encoding-guessed)(?::|$)/;

/** The plan without what was said of one file alone. */
export const ofAnyFile = (plan: ReadingPlan): ReadingPlan => ({
  ...plan,
  accepted: (plan.accepted ?? []).filter((key) => OF_ANY_FILE.test(key)),
});
