import { parseArgs } from "node:util";
import { usage } from "./trouble.ts";

interface Option {
  readonly type: "string" | "boolean";
  readonly default?: string | boolean;
}

type Values<O extends Readonly<Record<string, Option>>> = {
  [K in keyof O]: O[K] extends { default: string }
    ? string
    : O[K] extends { type: "string" }
      ? string | undefined
      : boolean;
};

export interface ReadOptions<O extends Readonly<Record<string, Option>>> {
  readonly values: Values<O>;
  readonly positionals: readonly string[];
}

/** Options and operands of a command. One that is unknown, doubled or without its value ends in a usage error. */
export const readOptions = <const O extends Readonly<Record<string, Option>>>(
  args: readonly string[],
  options: O,
  command: string,
): ReadOptions<O> => {
  try {
    const known: Readonly<Record<string, Option>> = options;
    const { values, positionals } = parseArgs({ args: [...args], options: known, allowPositionals: true });
    return { values: values as Values<O>, positionals };
  } catch (error) {
    const said = error instanceof Error ? error.message : String(error);
    const why = said.replaceAll("\n", " ").split(/[.?] To specify/)[0] ?? "";
    throw usage(`${why.replace(/\.$/, "")}.`, `\`shortlight ${command} --help\` lists the options.`);
  }
};

/** The value of an option that a command cannot do without. */
export const needed = (value: string | undefined, option: string, command: string): string => {
  if (value !== undefined && value !== "") return value;
  throw usage(`The option --${option} is missing.`, `\`shortlight ${command} --help\` says what it names.`);
};

/** The one operand of a command. */
export const oneOperand = (operands: readonly string[], what: string, command: string): string => {
  const [first, ...more] = operands;
  if (first !== undefined && more.length === 0) return first;
  throw usage(
    first === undefined ? `${what} is missing.` : `One operand is taken, and ${operands.length} are given.`,
    `\`shortlight ${command} --help\` shows how it is called.`,
  );
};

export const oneOf = <const T extends string>(value: string, choices: readonly T[], option: string): T => {
  const found = choices.find((choice) => choice === value);
  if (found !== undefined) return found;
  throw usage(`--${option} is “${value}”.`, `It takes ${choices.join(" or ")}.`);
};
