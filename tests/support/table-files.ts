/** Tables of numbers and texts as the binary files that archives send. */
export interface BinaryColumn {
  readonly name: string;
  readonly unit: string;
  /** Characters of a text; null for a double. */
  readonly characters: number | null;
}

export type BinaryRow = readonly (number | string)[];

const FITS_BLOCK = 2880;

const bytesOf = (columns: readonly BinaryColumn[]): number =>
  columns.reduce((sum, { characters }) => sum + (characters ?? 8), 0);

/** Rows as big-endian doubles and padded texts, one after another. */
const encodeRows = (
  columns: readonly BinaryColumn[],
  rows: readonly BinaryRow[],
  maskBytes: number,
): Buffer => {
  const bytes = Buffer.alloc(rows.length * (bytesOf(columns) + maskBytes));
  let at = 0;
  for (const row of rows) {
    at += maskBytes;
    for (const [i, { characters }] of columns.entries()) {
      const value = row[i];
      if (characters === null) bytes.writeDoubleBE(typeof value === "number" ? value : Number.NaN, at);
      else bytes.write(String(value ?? ""), at, characters, "latin1");
      at += characters ?? 8;
    }
  }
  return bytes;
};

const card = (key: string, value: number | string | boolean): string => {
  const shown =
    typeof value === "string" ? `'${value.padEnd(8)}'` : String(value === true ? "T" : value).padStart(20);
  return `${key.padEnd(8)}= ${shown}`.padEnd(80);
};

const header = (cards: readonly string[]): Buffer => {
  const text = [...cards, "END".padEnd(80)].join("");
  return Buffer.from(text.padEnd(Math.ceil(text.length / FITS_BLOCK) * FITS_BLOCK), "latin1");
};

/** A FITS binary table (FITS Standard 4.0, section 7.3) of so many rows, in pieces. */
export function* fitsTable(
  columns: readonly BinaryColumn[],
  blocks: Iterable<readonly BinaryRow[]>,
  rows: number,
): Generator<Buffer> {
  yield header([card("SIMPLE", true), card("BITPIX", 8), card("NAXIS", 0)]);
  const fields = columns.flatMap(({ name, unit, characters }, i) => [
    card(`TTYPE${i + 1}`, name),
    card(`TFORM${i + 1}`, characters === null ? "D" : `${characters}A`),
    ...(unit === "" ? [] : [card(`TUNIT${i + 1}`, unit)]),
  ]);
  yield header([
    card("XTENSION", "BINTABLE"),
    card("BITPIX", 8),
    card("NAXIS", 2),
    card("NAXIS1", bytesOf(columns)),
    card("NAXIS2", rows),
    card("PCOUNT", 0),
    card("GCOUNT", 1),
    card("TFIELDS", columns.length),
    ...fields,
  ]);
  for (const block of blocks) yield encodeRows(columns, block, 0);
  yield Buffer.alloc((FITS_BLOCK - ((rows * bytesOf(columns)) % FITS_BLOCK)) % FITS_BLOCK);
}

/** A VOTable in BINARY2 (VOTable 1.4, section 5.4), in pieces of whole groups of three bytes but for the last. */
export function* votableTable(
  columns: readonly BinaryColumn[],
  blocks: Iterable<readonly BinaryRow[]>,
): Generator<Buffer> {
  const fields = columns.map(({ name, unit, characters }) => {
    const type = characters === null ? 'datatype="double"' : `datatype="char" arraysize="${characters}"`;
    return `<FIELD name="${name}" ${type}${unit === "" ? "" : ` unit="${unit}"`}/>`;
  });
  yield Buffer.from(
    `<?xml version="1.0"?>\n<VOTABLE version="1.4"><RESOURCE><TABLE>${fields.join("\n")}\n<DATA><BINARY2><STREAM encoding="base64">\n`,
  );
  let rest = Buffer.alloc(0);
  for (const block of blocks) {
    const bytes = Buffer.concat([rest, encodeRows(columns, block, Math.ceil(columns.length / 8))]);
    const whole = bytes.length - (bytes.length % 3);
    rest = bytes.subarray(whole);
    yield Buffer.from(`${bytes.toString("base64", 0, whole)}\n`);
  }
  yield Buffer.from(`${rest.toString("base64")}\n</STREAM></BINARY2></DATA></TABLE></RESOURCE></VOTABLE>\n`);
}
