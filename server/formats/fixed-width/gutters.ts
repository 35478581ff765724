import type { Field } from "./cutter.ts";

/** Wider than any table in columns; without a limit one line could fill the memory. */
const MOST_CHARACTERS = 100_000;

/** The runs of places between those that are blank in every line. */
export const fieldsBetweenGutters = (lines: readonly string[]): Field[] => {
  const width = Math.min(
    MOST_CHARACTERS,
    lines.reduce((most, line) => Math.max(most, line.length), 0),
  );
  const isFilled = new Uint8Array(width + 1);
  for (const line of lines)
    for (let at = 0; at < line.length && at < width; at++) {
      const code = line.charCodeAt(at);
      if (code !== 32 && code !== 9) isFilled[at] = 1;
    }
  const fields: Field[] = [];
  for (let at = 0; at < width; at++) {
    if (!isFilled[at]) continue;
    const from = at;
    while (isFilled[at]) at++;
    fields.push({ from, to: at });
  }
  return fields;
};

/** The columns below a ruled line that is drawn for each of them. */
export const fieldsOfRule = (rule: string): Field[] =>
  Array.from(rule.matchAll(/[-=]+/g), (run) => ({ from: run.index, to: run.index + run[0].length }));

const textIn = (line: string, { from, to }: Field): string => line.slice(from, to).trim();

/** Fields that one blank alone parts from each other. */
const closeTogether = (fields: readonly Field[]): Field[][] => {
  const clusters: Field[][] = [];
  for (const field of fields) {
    const last = clusters.at(-1);
    const before = last?.at(-1);
    if (last && before && field.from - before.to === 1) last.push(field);
    else clusters.push([field]);
  }
  return clusters;
};

const joined = (fields: readonly Field[]): Field[] => {
  const [first, last] = [fields[0], fields.at(-1)];
  return first && last ? [{ from: first.from, to: last.to }] : [];
};

/**
 * Joins fields that no name stands above to the named neighbour that only one blank parts from them: values of several
 * words, or of hours, minutes and seconds. Null where it may be either of two neighbours.
 */
export const joinUnnamed = (fields: readonly Field[], names: string): Field[] | null => {
  const result: Field[] = [];
  for (const cluster of closeTogether(fields)) {
    const isNamed = cluster.map((field) => textIn(names, field) !== "");
    const [first, last] = [isNamed.indexOf(true), isNamed.lastIndexOf(true)];
    if (isNamed.slice(Math.max(first, 0), last).includes(false)) return null;
    if (first === last) result.push(...joined(cluster));
    else
      result.push(
        ...joined(cluster.slice(0, first + 1)),
        ...cluster.slice(first + 1, last),
        ...joined(cluster.slice(last)),
      );
  }
  return result;
};
