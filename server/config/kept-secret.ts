import { randomBytes, randomUUID } from "node:crypto";
import { linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { dirname } from "node:path";

/** The secret in that file, made on first use and readable by its owner alone. */
export const keptSecret = (file: string): string => {
  mkdirSync(dirname(file), { recursive: true });
  const found = readIfThere(file);
  if (found) return found;
  // Written whole and then linked: of two processes that start together one wins, and both use what it wrote.
  const aside = `${file}.${randomUUID()}`;
  writeFileSync(aside, randomBytes(32).toString("hex"), { mode: 0o600, flag: "wx" });
  try {
    linkSync(aside, file);
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === "EEXIST")) throw error;
  } finally {
    rmSync(aside, { force: true });
  }
  return readFileSync(file, "utf8").trim();
};

const readIfThere = (file: string): string | null => {
  try {
    return readFileSync(file, "utf8").trim() || null;
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    throw error;
  }
};
