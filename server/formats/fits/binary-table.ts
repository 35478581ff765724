import type { ColumnType, ColumnValues } from "../table.ts";
import {
  applyScale,
  readBits,
  readFloats32,
  readFloats64,
  readInt16s,
  readInt32s,
  readInt64Numbers,
  readInt64Texts,
  readLogicals,
  readUint8s,
} from "./binary-cells.ts";
import { wholeOf } from "./card.ts";
import { type ColumnReader, columnName, describeColumn, type RowBlock } from "./columns.ts";
import { badHeader, counted, quoted } from "./errors.ts";
import type { Findings } from "./findings.ts";
import { type BinaryForm, readBinaryForm } from "./form.ts";
import type { Hdu } from "./hdu.ts";
import type { FitsHeader } from "./header.ts";
import { type LeftOut, leaveOut } from "./left-out.ts";
import { isScaled, readScale, type Scale } from "./scale.ts";
import { readTexts } from "./text-cells.ts";

/** A column of a binary table in its place. */
interface Field {
  readonly header: FitsHeader;
  readonly place: number;
  readonly form: BinaryForm;
  /** Bytes of the row before it. */
  readonly offset: number;
  readonly findings: Findings;
}

type Read = (block: RowBlock) => ColumnValues;

/** More bits than this in one cell are data of their own and no flags. */
const MOST_BITS = 64;

const formOf = (header: FitsHeader, place: number): BinaryForm => {
  const text = header.text(`TFORM${place}`);
  const form = readBinaryForm(text ?? "");
  if (form) return form;
  const what =
    text === null ? "has no TFORM" : `has the form ${quoted(text)}, which the format does not know`;
  throw badHeader(
    `Column ${place} (${columnName(header, place)}) ${what}; where it and all columns behind it stand is not known.`,
  );
};

const fieldsOf = ({ header, rowBytes }: Hdu, findings: Findings): Field[] => {
  const fields: Field[] = [];
  let offset = 0;
  for (let place = 1; place <= header.count("TFIELDS"); place++) {
    const form = formOf(header, place);
    fields.push({ header, place, form, offset, findings });
    offset += form.bytes;
  }
  if (offset !== rowBytes)
    throw badHeader(
      `The columns take ${counted(offset)} bytes together, but NAXIS1 says ${counted(rowBytes)} for a row; values would be read from the wrong places.`,
    );
  return fields;
};

/** TDIM that parts a text of many letters into several texts. */
const isTextArray = ({ header, place, form }: Field): boolean => {
  const sizes = (header.text(`TDIM${place}`) ?? "").match(/\d+/g)?.map(Number) ?? [];
  const width = Number(/^\d+/.exec(form.more)?.[0] ?? 0);
  return sizes.slice(1).some((size) => size > 1) || (width > 0 && width < form.repeat);
};

const whyLeftOut = (field: Field): LeftOut | null => {
  const { code, repeat } = field.form;
  if (code === "P" || code === "Q") return "variable";
  if (code === "A") return isTextArray(field) ? "array" : null;
  if (repeat === 0) return "empty";
  if (code === "C" || code === "M") return "complex";
  return repeat > (code === "X" ? MOST_BITS : 1) ? "array" : null;
};

const STORED = {
  B: { type: "uint8", least: 0n, most: 255n },
  I: { type: "int16", least: -32768n, most: 32767n },
  J: { type: "int32", least: -(2n ** 31n), most: 2n ** 31n - 1n },
  K: { type: "int64", least: -(2n ** 63n), most: 2n ** 63n - 1n },
} as const;

type WholeCode = keyof typeof STORED;

/** TZERO by which the format keeps numbers of the other signedness. */
const CONVENTIONS: Record<WholeCode, { shift: bigint; type: ColumnType }> = {
  B: { shift: -128n, type: "int8" },
  I: { shift: 2n ** 15n, type: "uint16" },
  J: { shift: 2n ** 31n, type: "uint32" },
  K: { shift: 2n ** 63n, type: "uint64" },
};

const typeOfWhole = (code: WholeCode, scale: Scale): ColumnType => {
  if (!isScaled(scale)) return STORED[code].type;
  if (scale.shift === CONVENTIONS[code].shift) return CONVENTIONS[code].type;
  return code === "K" && scale.shift !== null ? "int64" : "float64";
};

/** TNULL of a column of whole numbers, a stored value; null where there is none that could occur. */
const blankOf = ({ header, place, findings }: Field, code: WholeCode): bigint | null => {
  const text = header.text(`TNULL${place}`);
  if (text === null) return null;
  const mark = wholeOf(text);
  if (mark !== null && mark >= STORED[code].least && mark <= STORED[code].most) return mark;
  ignoreBlank(text, columnName(header, place), findings);
  return null;
};

const ignoreBlank = (mark: string, name: string, findings: Findings): void =>
  findings.add(
    {
      key: "fits-useless-null",
      level: "note",
      message: "TNULL marks that their columns cannot hold were not used.",
      hint: "If a number stands for no value in such a column, say so among its marks of a blank.",
    },
    `${name}: ${mark}`,
  );

const READ_WHOLE = { B: readUint8s, I: readInt16s, J: readInt32s } as const;

const readWhole = (code: WholeCode, offset: number, blank: bigint | null, scale: Scale): Read => {
  if (code === "K") {
    const { shift } = scale;
    if (shift !== null) return (block) => readInt64Texts(block, offset, blank, shift);
    return (block) => applyScale(readInt64Numbers(block, offset, blank), scale.scale, scale.zero);
  }
  const read = READ_WHOLE[code];
  const mark = blank === null ? Number.NaN : Number(blank);
  return (block) => applyScale(read(block, offset, mark), scale.scale, scale.zero);
};

/**
 * Some programs write TNULL of an unsigned column as the number itself, not as what is stored for it. The standard is
 * followed, and a number that would be blank by the other reading is asked about.
 */
const watchMark = (read: Read, { header, place, findings }: Field, blank: bigint): Read => {
  const name = columnName(header, place);
  const number = Number(blank);
  const text = String(blank);
  return (block) => {
    const values = read(block);
    for (let row = 0; row < block.rows; row++)
      if (values[row] === number || values[row] === text) askMark(text, name, block.firstRow + row, findings);
    return values;
  };
};

const askMark = (mark: string, name: string, row: number, findings: Findings): void =>
  findings.add(
    {
      key: "fits-unsigned-null",
      level: "ask",
      message:
        "Columns of unsigned numbers hold the very number that their TNULL names. By the rules of the format TNULL means what is stored, which is another number, but not all programs keep to that.",
      hint: "If the number stands for no value, add it to the column's marks of a blank.",
    },
    `row ${row}, ${name}: ${mark}`,
  );

const wholeReader = (field: Field, code: WholeCode): ColumnReader | null => {
  const { header, place, offset, findings } = field;
  const scale = readScale(header, place);
  if (!scale) return leaveOut("scale", header, place, findings);
  const blank = blankOf(field, code);
  const read = readWhole(code, offset, blank, scale);
  const isUnsigned = scale.shift !== null && scale.shift > 0n;
  return {
    column: describeColumn(header, place, typeOfWhole(code, scale), blank === null ? null : String(blank)),
    bytes: field.form.bytes,
    read: isUnsigned && blank !== null ? watchMark(read, field, blank) : read,
  };
};

const floatReader = (field: Field, code: "E" | "D"): ColumnReader | null => {
  const { header, place, offset, findings } = field;
  const scale = readScale(header, place);
  if (!scale) return leaveOut("scale", header, place, findings);
  const read = code === "E" ? readFloats32 : readFloats64;
  const type = code === "E" && !isScaled(scale) ? "float32" : "float64";
  return {
    column: describeColumn(header, place, type, null),
    bytes: field.form.bytes,
    read: (block) => applyScale(read(block, offset), scale.scale, scale.zero),
  };
};

const otherReader = ({ header, place, form, offset, findings }: Field): ColumnReader => {
  const name = columnName(header, place);
  if (form.code === "L")
    return {
      column: describeColumn(header, place, "boolean", null),
      bytes: form.bytes,
      read: (block) => readLogicals(block, offset, name, findings),
    };
  if (form.code === "X")
    return {
      column: describeColumn(header, place, form.repeat === 1 ? "boolean" : "text", null),
      bytes: form.bytes,
      read: (block) => readBits(block, offset, form.repeat),
    };
  return {
    column: describeColumn(header, place, "text", null),
    bytes: form.bytes,
    read: (block) => readTexts(block, offset, form.repeat, name, findings),
  };
};

const readerOf = (field: Field): ColumnReader | null => {
  const { header, place, form, findings } = field;
  const why = whyLeftOut(field);
  if (why) return leaveOut(why, header, place, findings);
  const { code } = form;
  if (code === "B" || code === "I" || code === "J" || code === "K") return wholeReader(field, code);
  const mark = header.text(`TNULL${place}`);
  if (mark !== null) ignoreBlank(mark, columnName(header, place), findings);
  return code === "E" || code === "D" ? floatReader(field, code) : otherReader(field);
};

/** The columns of a binary table that hold one value in each row; the others become findings. */
export const binaryColumns = (table: Hdu, findings: Findings): ColumnReader[] => {
  if (table.header.isTrue("ZTABLE"))
    throw badHeader(
      `The table ${quoted(table.name)} is compressed inside its rows (ZTABLE), which is not read.`,
    );
  return fieldsOf(table, findings)
    .map(readerOf)
    .filter((reader) => reader !== null);
};
