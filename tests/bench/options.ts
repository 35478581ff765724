import { parseArgs } from "node:util";

export interface BenchOptions {
  only: string | undefined;
  rows: number | undefined;
  out: string | undefined;
}

/** `--only NAME --rows N --out FILE.json`; anything else is refused in one sentence. */
export const readOptions = (args: string[]): BenchOptions => {
  const { values } = parseArgs({
    args,
    options: { only: { type: "string" }, rows: { type: "string" }, out: { type: "string" } },
  });
  if (values.rows !== undefined && !/^[1-9]\d*$/.test(values.rows))
    throw new Error(`--rows takes a whole number of rows above 0, not ${values.rows}.`);
  return {
    only: values.only,
    rows: values.rows === undefined ? undefined : Number(values.rows),
    out: values.out,
  };
};
