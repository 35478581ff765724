import { randomBytes } from "node:crypto";
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { dirname } from "node:path";

/** The secret in that file, made on first use and readable by its owner alone. */
export const keptSecret = (file: string): string => {
  mkdirSync(dirname(file), { recursive: true });
  try {
    // `wx`: of two processes that start together one writes, and both use what it wrote.
    writeFileSync(file, randomBytes(32).toString("hex"), { mode: 0o600, flag: "wx" });
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === "EEXIST")) throw error;
  }
  return readFileSync(file, "utf8").trim();
};
