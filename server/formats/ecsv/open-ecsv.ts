import { Readable } from "node:stream";
import { type Batch, readRecords } from "../read-records.ts";
import type { OpenTable, RowBatch, TableFinding } from "../table.ts";
import { badHeader } from "./errors.ts";
import { type EcsvHeader, readEcsvHeader } from "./header.ts";
import { readHeaderLines } from "./header-lines.ts";
import { cellsOf, EcsvRows } from "./rows.ts";

const EXAMPLES = 5;

/** The line of names says again what the header says: where they differ, the columns cannot be told apart. */
const checkNames = (header: EcsvHeader, names: readonly string[]): void => {
  const wanted = header.columns.map((c) => c.name);
  const at = wanted.findIndex((name, i) => name !== names[i]?.trim());
  if (at < 0 && names.length === wanted.length) return;
  throw badHeader(
    at < 0
      ? `The line of names has ${names.length} names and the header ${wanted.length} columns.`
      : `Column ${at + 1} is “${wanted[at]}” in the header and “${names[at] ?? ""}” in the line of names.`,
  );
};

const findingsOf = (header: EcsvHeader): readonly TableFinding[] => {
  const out = header.columns.filter((c) => c.column === null);
  if (out.length === 0) return [];
  return [
    {
      key: "columns-left-out",
      level: "note",
      message: `${out.length} of ${header.columns.length} columns are left out, as their cells hold no single number or text.`,
      hint: "Nothing needs to be done unless one of them is needed; then write its parts as columns of their own.",
      count: out.length,
      examples: out.slice(0, EXAMPLES).map(({ name, why }) => `${name}: ${why}`),
    },
  ];
};

/**
 * Opens an ECSV 1.0 table: a YAML header behind comment marks, then values between blanks or commas.
 *
 * @see Astropy Proposal for Enhancement 6, revision of 2021.
 */
export const openEcsv: OpenTable = async (source) => {
  const { lines, bytes, body } = await readHeaderLines(source);
  const header = readEcsvHeader(lines);
  const records = readRecords(Readable.from(body), { encoding: "utf-8", delimiter: header.delimiter });
  const first = await records.next();
  const [names, ...opened] = first.done ? [] : first.value.records;
  if (first.done || !names) throw badHeader("The line of names after the header is missing.");
  checkNames(header, cellsOf(names, header.delimiter));
  const rows = new EcsvRows(header, lines.length);
  const take = (batch: Batch): RowBatch => rows.batch(batch.records, bytes + batch.bytes);
  const begun: Batch = { records: opened, bytes: first.value.bytes };

  async function* batches(): AsyncGenerator<RowBatch> {
    try {
      yield take(begun);
      for await (const batch of records) yield take(batch);
    } finally {
      await records.return(undefined);
    }
  }

  return {
    header: {
      format: "ecsv",
      variant: header.delimiter === "," ? "commas" : "blanks",
      encoding: "utf-8",
      columns: header.columns.flatMap((c) => c.column ?? []),
      declaredRows: null,
      meta: header.meta,
    },
    batches: batches(),
    findings: () => findingsOf(header),
  };
};
