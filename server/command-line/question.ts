import type { PlanFile } from "./plan-file.ts";

/** Something that the file cannot say and a person must, before its numbers can be trusted. */
export interface Question {
  readonly message: string;
  readonly hint: string;
  /** One of the answers, as a plan would give it. */
  readonly answer: PlanFile;
}

/** A plan's answer about one column. */
export const columnAnswer = (header: string, column: NonNullable<PlanFile["columns"]>[string]): PlanFile => ({
  columns: { [header]: column },
});

/** A plan that gives each question one of its answers. */
export const planOf = (questions: readonly Question[]): PlanFile => {
  const columns: NonNullable<PlanFile["columns"]> = {};
  const accept = questions.flatMap(({ answer }) => answer.accept ?? []);
  let plan: PlanFile = {};
  for (const { answer } of questions) {
    plan = { ...plan, ...answer, ...(accept.length > 0 ? { accept } : {}) };
    for (const [header, column] of Object.entries(answer.columns ?? {}))
      columns[header] = { ...columns[header], ...column };
  }
  return Object.keys(columns).length === 0 ? plan : { ...plan, columns };
};
