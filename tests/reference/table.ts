import { inject } from "vitest";
import type { makeInputs } from "./inputs.ts";

/** By subject, rows of numbers; what each row holds is said in `inputs.ts`. */
export type Inputs = ReturnType<typeof makeInputs>;
/** By subject, a row of numbers for each row of the input; what each holds is said in `sky.py`. */
export type Answers = Record<keyof Inputs, number[][]>;

export interface Row {
  input: readonly number[];
  expected: readonly number[];
}

/** The rows of one subject with astropy's answers. Throws when astropy could not be asked, so that the test fails. */
export const referenceRows = (subject: keyof Inputs): Row[] => {
  const table = inject("skyReference");
  if ("failure" in table) throw new Error(table.failure);
  const inputs: readonly number[][] = table.inputs[subject];
  const answers = table.answers[subject];
  if (answers.length !== inputs.length) throw new Error(`astropy left out rows of ${subject}.`);
  return inputs.map((input, index) => ({ input, expected: answers[index] ?? [] }));
};

/** One number of a row; fails rather than compare with what is not there. */
export const at = (row: readonly number[], index: number): number => {
  const value = row[index];
  if (value === undefined) throw new Error(`The row has no number ${index}.`);
  return value;
};

/** Sets each row's difference against what is allowed for it, and names the row that has too much. */
export const expectWithin = (
  subject: keyof Inputs,
  difference: (input: readonly number[], expected: readonly number[]) => number,
  allowed: number | ((input: readonly number[]) => number),
): void => {
  for (const { input, expected } of referenceRows(subject)) {
    const limit = typeof allowed === "number" ? allowed : allowed(input);
    const found = difference(input, expected);
    // Not `>`: a difference that is missing must fail too.
    if (!(found <= limit))
      throw new Error(`${subject} of ${input.join(", ")}: off by ${found}, allowed are ${limit}.`);
  }
};
