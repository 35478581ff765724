import { AppError } from "../../errors.ts";
import type { ByteSource } from "./byte-source.ts";
import { DataSum } from "./data-sum.ts";
import { counted, cutOff, noTable, notFits, quoted } from "./errors.ts";
import type { Findings } from "./findings.ts";
import { describeHdu, type Hdu, paddingOf } from "./hdu.ts";
import { type FitsHeader, readHeader } from "./header.ts";

/** A file up to the rows of the table that is read. */
export interface Opened {
  readonly file: FitsHeader;
  readonly table: Hdu;
  /** Headers read so far. */
  readonly headers: number;
}

/** More headers than this are no collection of tables. */
const MOST_HEADERS = 10_000;

const isTable = (hdu: Hdu): boolean => hdu.kind === "binary table" || hdu.kind === "ASCII table";

/** Passes over data before the table that is sought; without it nothing behind can be found. */
const skipData = async (source: ByteSource, hdu: Hdu): Promise<void> => {
  const bytes = hdu.dataBytes + paddingOf(hdu);
  const skipped = await source.skip(bytes);
  if (skipped < hdu.dataBytes)
    throw cutOff(
      `${counted(skipped)} of ${counted(hdu.dataBytes)} bytes of the data of ${quoted(hdu.name)} are there`,
    );
};

const contentsOf = (kinds: readonly string[]): string => {
  const images = kinds.filter((kind) => kind === "image").length;
  const others = kinds.length - images;
  const parts = [
    images > 0 ? `${counted(images)} ${images === 1 ? "image" : "images"}` : "",
    others > 0 ? `${counted(others)} ${others === 1 ? "part" : "parts"} of other kinds` : "",
  ].filter((part) => part !== "");
  return parts.join(" and ") || "headers";
};

/** Half a header after a table without rows: the one with the rows may be what is missing. */
const isCutOff = (error: AppError): boolean => error.code === "file-cut-off";

/** Reads up to the rows of the first table that has rows; else the first table without. */
export const findTable = async (source: ByteSource, findings: Findings): Promise<Opened> => {
  const file = await readHeader(source, "SIMPLE");
  if (!file) throw notFits();
  const first = describeHdu(file, 0);
  const kinds = first.dataBytes > 0 ? [first.kind as string] : [];
  let empty: Hdu | null = null;
  let hdu = first;
  for (let headers = 1; headers < MOST_HEADERS; headers++) {
    await skipData(source, hdu);
    const header = await nextHeader(source, (error) => empty !== null && !isCutOff(error), findings);
    if (!header) break;
    hdu = describeHdu(header, headers);
    if (isTable(hdu) && hdu.rows > 0) {
      if (empty) noteOther(empty, findings);
      return { file, table: hdu, headers: headers + 1 };
    }
    if (!isTable(hdu)) kinds.push(hdu.kind);
    else if (empty) noteOther(hdu, findings);
    else empty = hdu;
  }
  if (!empty) throw noTable(contentsOf(kinds));
  return { file, table: empty, headers: Number.POSITIVE_INFINITY };
};

/** Where there is a table already, what follows and is no header may be worth a note alone. */
const nextHeader = async (
  source: ByteSource,
  isHarmless: (error: AppError) => boolean,
  findings: Findings,
): Promise<FitsHeader | null> => {
  const at = source.position;
  try {
    return await readHeader(source, "XTENSION");
  } catch (error) {
    if (!(error instanceof AppError) || !isHarmless(error)) throw error;
    noteRest(at, findings);
    return null;
  }
};

const noteOther = (hdu: Hdu, findings: Findings): void =>
  findings.add(
    {
      key: "fits-other-tables",
      level: "note",
      message: "The file holds further tables; only the first that has rows is read.",
      hint: "To bring another of them, save it as a file of its own.",
    },
    `${hdu.name}: ${counted(hdu.rows)} rows`,
  );

const noteRest = (at: number, findings: Findings): void =>
  findings.add(
    {
      key: "fits-rest",
      level: "note",
      message: "Behind the last part that can be read the file goes on with something that is not FITS.",
      hint: "Nothing, unless the file should hold more; then get it again.",
    },
    `from byte ${counted(at)}`,
  );

const noteShortEnd = (missing: number, findings: Findings): void =>
  findings.add(
    {
      key: "fits-short-end",
      level: "note",
      message: "The file ends before its last block is full; all rows of the table are there.",
      hint: "Nothing, unless the file should hold more behind the table; then get it again.",
    },
    `${counted(missing)} bytes missing`,
  );

/** False where the file ends within. */
const passData = async (source: ByteSource, bytes: number, findings: Findings): Promise<boolean> => {
  const skipped = await source.skip(bytes);
  if (skipped < bytes) noteShortEnd(bytes - skipped, findings);
  return skipped === bytes;
};

const checkSum = ({ header }: Hdu, sum: DataSum, findings: Findings): void => {
  const declared = header.number("DATASUM");
  if (Number.isNaN(declared) || sum.value() === declared) return;
  findings.add(
    {
      key: "fits-sum",
      level: "ask",
      message:
        "The table's bytes do not add up to the sum that the file gives for them (DATASUM). Some of them were changed on the way, or a program changed the table without a new sum.",
      hint: "Get the file again. If it stays so, compare some values with their source before you trust the table.",
    },
    `${declared} in the file, ${sum.value()} from its bytes`,
  );
};

/** The sum of the table's data is taken from here on, where the file has one to compare it with. */
export const beginSum = (source: ByteSource, { table }: Opened): void => {
  if (table.header.text("DATASUM") !== null) source.sum = new DataSum();
};

/** Looks at what comes behind the rows: whether the data are sound, and which tables are not read. */
export const surveyRest = async (source: ByteSource, opened: Opened, findings: Findings): Promise<void> => {
  const { table } = opened;
  const behindRows = table.dataBytes - table.rows * table.rowBytes + paddingOf(table);
  if (!(await passData(source, behindRows, findings))) return;
  if (source.sum) checkSum(table, source.sum, findings);
  source.sum = null;
  await surveyTables(source, opened.headers, findings);
};

const surveyTables = async (source: ByteSource, from: number, findings: Findings): Promise<void> => {
  for (let headers = from; headers < MOST_HEADERS; headers++) {
    const at = source.position;
    const header = await nextHeader(source, () => true, findings);
    if (!header) return;
    const hdu = describeOrNote(header, headers, at, findings);
    if (!hdu) return;
    if (isTable(hdu)) noteOther(hdu, findings);
    if (!(await passData(source, hdu.dataBytes + paddingOf(hdu), findings))) return;
  }
};

const describeOrNote = (header: FitsHeader, place: number, at: number, findings: Findings): Hdu | null => {
  try {
    return describeHdu(header, place);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    noteRest(at, findings);
    return null;
  }
};
