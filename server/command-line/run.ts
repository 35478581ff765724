import { DERIVE_HELP, derive } from "./derive.ts";
import { EXPLAIN_HELP, explain } from "./explain.ts";
import { PRECISION_HELP, precision } from "./precision.ts";
import { READ_HELP, read } from "./read.ts";
import { type Surroundings, write } from "./surroundings.ts";
import { EXIT, exitCode, isClosedPipe, troubleText, usage } from "./trouble.ts";

interface Command {
  readonly run: (args: readonly string[], at: Surroundings) => Promise<void>;
  readonly help: string;
}

const COMMANDS: Readonly<Record<string, Command>> = {
  derive: { run: derive, help: DERIVE_HELP },
  explain: { run: explain, help: EXPLAIN_HELP },
  precision: { run: precision, help: PRECISION_HELP },
  read: { run: read, help: READ_HELP },
};

const HELP = `Works out what a transit survey can do with a star, without a server and without a database.

  shortlight derive FILE --card CARD --campaign CAMPAIGN
      every derived column of every star of an extract, with its error and the reason where it is blank
  shortlight explain FILE --star ID --quantity KEY
      how one of these numbers comes about, step by step
  shortlight precision --diameters LIST --exposures LIST --magnitude M
      how precisely a star can be measured, by diameter of the aperture and time
  shortlight read FILE
      what the readers make of a file: its format, columns and rows, and what is wrong with it

  shortlight COMMAND --help says more of each.

Exit codes: 0 done; 1 failed; 2 the command leaves something to say: an option, or the answer to a question about
the file. What went wrong stands on the standard error; nothing is written then.
`;

const isHelp = (arg: string | undefined): boolean => arg === "--help" || arg === "-h" || arg === "help";

const dispatch = async (args: readonly string[], at: Surroundings): Promise<void> => {
  const [name, ...rest] = args;
  if (name === undefined) throw usage("No command is named.", "`shortlight --help` lists the commands.");
  if (isHelp(name)) return write(at.out, HELP);
  const command = Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined;
  if (!command) throw usage(`There is no command “${name}”.`, "`shortlight --help` lists the commands.");
  return rest.some((arg) => isHelp(arg) && arg !== "help")
    ? write(at.out, command.help)
    : command.run(rest, at);
};

/** Runs one command. Resolves to the code that the process ends with. */
export const runCommandLine = async (args: readonly string[], at: Surroundings): Promise<number> => {
  // A closed pipe rejects the write that met it; without a listener it would end the process as well.
  for (const stream of [at.out, at.err]) stream.on("error", () => undefined);
  try {
    await dispatch(args, at);
    return EXIT.done;
  } catch (error) {
    if (isClosedPipe(error)) return EXIT.done;
    await write(at.err, troubleText(error)).catch(() => undefined);
    return exitCode(error);
  }
};
