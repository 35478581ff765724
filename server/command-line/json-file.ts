import { readFile, stat } from "node:fs/promises";
import { resolve } from "node:path";
import type { z } from "zod";
import { unprocessable } from "../errors.ts";
import { systemWords } from "./trouble.ts";

/** Settings are small: a larger file is a mistake. */
const MOST_BYTES = 4 * 1024 * 1024;
const SHOWN_ISSUES = 5;

const readText = async (path: string, what: string): Promise<string> => {
  try {
    const { size } = await stat(path);
    if (size > MOST_BYTES)
      throw unprocessable("too-large", `${what} ${path} has ${size} bytes, more than settings have.`);
    return await readFile(path, "utf8");
  } catch (error) {
    const why = systemWords(error);
    if (why === undefined) throw error;
    throw unprocessable("no-file", `${what} ${path} cannot be read: ${why}.`, {
      hint: "Check its name and from which folder it is named.",
      cause: error,
    });
  }
};

const placeOf = (issue: z.core.$ZodIssue): string =>
  issue.path.length === 0 ? "" : `${issue.path.map(String).join(".")}: `;

const issuesOf = (error: z.ZodError): string =>
  error.issues
    .slice(0, SHOWN_ISSUES)
    .map((issue) => `${placeOf(issue)}${issue.message}`)
    .join("\n");

/**
 * A file of settings.
 *
 * @param what words for it, such as `"The card"`
 */
export const readJsonFile = async <T>(
  folder: string,
  name: string,
  what: string,
  schema: z.ZodType<T>,
): Promise<T> => {
  const path = resolve(folder, name);
  const text = await readText(path, what);
  let content: unknown;
  try {
    content = JSON.parse(text.replace(/^\ufeff/, ""));
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    throw unprocessable("bad-json", `${what} ${path} is not JSON: ${why}`, {
      hint: "Mend the file; `--help` says what it holds.",
    });
  }
  const parsed = schema.safeParse(content);
  if (parsed.success) return parsed.data;
  throw unprocessable("bad-settings", `${what} ${path} does not hold the settings it should.`, {
    hint: issuesOf(parsed.error),
  });
};
