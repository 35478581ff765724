import { z } from "zod";
import { readingPlan } from "#shared/api/extracts.ts";
import { KEPT, MEANINGS } from "#shared/catalogue/header-spellings.ts";
import { readJsonFile } from "./json-file.ts";

const keys: readonly string[] = [...MEANINGS.map((m) => m.key), KEPT];

const planColumn = z.strictObject({
  key: z.string().refine((key) => keys.includes(key), {
    error: (issue) => `“${String(issue.input)}” is no key of the catalogue; the keys are ${keys.join(", ")}.`,
  }),
  unit: z.string().optional(),
  blankMarks: z.array(z.string()).optional(),
  keptNumbers: z.array(z.string()).optional(),
});

const { delimiter, encoding, decimalMark, release, epoch } = readingPlan.shape;

/** Answers to what a file cannot say itself. All are optional. */
const planFile = z.strictObject({
  delimiter: delimiter.exclude([" "]).optional(),
  decimalMark: decimalMark.optional(),
  encoding: encoding.optional(),
  epoch: epoch.optional(),
  release: release.optional(),
  /** Findings about the file that do not keep it from being read. */
  accept: z.array(z.string()).optional(),
  columns: z.record(z.string(), planColumn).optional(),
});

export type PlanColumn = z.infer<typeof planColumn>;
export type PlanFile = z.infer<typeof planFile>;
export type Dialect = Pick<PlanFile, "delimiter" | "decimalMark" | "encoding">;

export const readPlanFile = async (folder: string, name: string | undefined): Promise<PlanFile> =>
  name === undefined ? {} : readJsonFile(folder, name, "The plan", planFile);
