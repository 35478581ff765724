import { createHash } from "node:crypto";

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value);

const sorted = (value: unknown): unknown => {
  if (Array.isArray(value)) return value.map(sorted);
  if (!isPlain(value)) return value;
  return Object.fromEntries(
    Object.keys(value)
      .toSorted()
      .map((key) => [key, sorted(value[key])]),
  );
};

/** One text for one content: keys sorted at every depth, no spaces, numbers as JSON writes them. */
export const canonicalJson = (content: unknown): string => JSON.stringify(sorted(content));

/** SHA-256 of the canonical JSON, as 64 hexadecimal digits: the same content has the same hash on any machine. */
export const contentHash = (content: unknown): string =>
  createHash("sha256").update(canonicalJson(content)).digest("hex");
