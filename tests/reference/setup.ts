import type { TestProject } from "vitest/node";
import { runAstropy } from "./astropy.ts";
import { makeInputs } from "./inputs.ts";
import type { Answers, Inputs } from "./table.ts";

declare module "vitest" {
  interface ProvidedContext {
    /** Inputs and what astropy makes of them; in their place the reason why there are none. */
    skyReference: { inputs: Inputs; answers: Answers } | { failure: string };
  }
}

/** Asks astropy once for all files. A failure is left to the tests, as one thrown here would end every project. */
export default async function setUp(project: TestProject): Promise<void> {
  const inputs = makeInputs();
  try {
    const answers = (await runAstropy("sky.py", inputs)) as Answers;
    project.provide("skyReference", { inputs, answers });
  } catch (error) {
    project.provide("skyReference", { failure: error instanceof Error ? error.message : String(error) });
  }
}
