import { blankReason, PRESENT } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, COLUMNS, type Column, errorKey } from "#shared/catalogue/columns.ts";
import { flagsIn } from "#shared/catalogue/flags.ts";
import { methodKey } from "#shared/catalogue/methods.ts";
import { GIVEN } from "../catalogue/adopt.ts";
import { METHOD_KEYS } from "../database/star-table.ts";
import type { EcsvColumn } from "../handover/ecsv.ts";
import type { WorkedOut } from "./worked-out.ts";

type Cell = string | number | null;
/** The cell of one row of a block; null is a blank. */
type CellOf = (row: number) => Cell;

export interface OutputColumn extends EcsvColumn {
  readonly bind: (block: WorkedOut) => CellOf;
}

const numberOrBlank = (value: number | undefined): number | null =>
  value === undefined || Number.isNaN(value) ? null : value;

const givenCell = (key: string): OutputColumn["bind"] => {
  const at = GIVEN.indexOf(key);
  return ({ rows }) =>
    (row) =>
      rows[row]?.[at] ?? null;
};

/** Numbers by key, of the star itself or as the instrument sees it. */
const numbersOf = ({ stellar, instrument }: WorkedOut, key: string): ArrayLike<number> | undefined => {
  if (key === "flags") return stellar.flags;
  const seen: Readonly<Record<string, ArrayLike<number>>> = { ...instrument };
  return stellar.values[key] ?? stellar.blanks[key] ?? seen[key];
};

const derivedCell =
  (key: string): OutputColumn["bind"] =>
  (block) => {
    const numbers = numbersOf(block, key);
    return (row) => numberOrBlank(numbers?.[row]);
  };

const blankCell =
  (key: string): OutputColumn["bind"] =>
  (block) => {
    const codes = numbersOf(block, key);
    return (row) => {
      const code = codes?.[row] ?? PRESENT;
      return code === PRESENT ? null : blankReason(code).key;
    };
  };

const headerOf = (c: Column): EcsvColumn => ({
  name: c.key,
  datatype: c.kind === "text" ? "string" : c.kind === "integer" ? "int64" : "float64",
  unit: c.unit,
  ucd: c.ucd,
  description: c.description,
  ...(c.key === "source_id" ? { isIdentifier: true } : {}),
});

const errorHeaderOf = (c: Column): EcsvColumn => ({
  ...headerOf(c),
  name: errorKey(c.key),
  ucd: `stat.error;${c.ucd.split(";")[0]}`,
  description: `One-sigma error of ${c.key}`,
});

const blankHeaderOf = (c: Column): EcsvColumn => ({
  name: blankKey(c.key),
  datatype: "string",
  unit: "",
  ucd: "meta.note",
  description: `Why ${c.key} is blank`,
});

const columnsOf = (c: Column): OutputColumn[] => {
  const cell = c.stage === "given" ? givenCell : derivedCell;
  const value = { ...headerOf(c), bind: cell(c.key) };
  const error = { ...errorHeaderOf(c), bind: cell(errorKey(c.key)) };
  const blank = { ...blankHeaderOf(c), bind: blankCell(blankKey(c.key)) };
  // A count of flags is always there.
  const hasBlank = c.stage !== "given" && c.key !== "flags";
  return [value, ...(c.hasError ? [error] : []), ...(hasBlank ? [blank] : [])];
};

/** By which relation a quantity came about, as the key of a method. */
const methodOf = (c: Column): OutputColumn[] =>
  METHOD_KEYS.some((key) => key === c.key)
    ? [
        {
          name: `${c.key}_method`,
          datatype: "string",
          unit: "",
          ucd: "meta.note",
          description: `By which relation ${c.key} came about`,
          bind: ({ stellar }) => {
            const codes = stellar.methods[`${c.key}_method`];
            return (row) => methodKey(codes?.[row] ?? 0) ?? null;
          },
        },
      ]
    : [];

/** Which flags a star carries, those that only inform too. */
const FLAG_WORDS: OutputColumn = {
  name: "flag_words",
  datatype: "string",
  unit: "",
  ucd: "meta.code.qual",
  description: "Flags of the star and marks of its values, between semicolons",
  bind:
    ({ stellar }) =>
    (row) =>
      flagsIn(stellar.flagBits[row] ?? 0)
        .map((flag) => flag.word)
        .join("; ") || null,
};

/** Quantities that may be given or derived stand twice: as given, and as what the recipe makes of it. */
const asGiven = (c: Column): OutputColumn[] => {
  const key = `${c.key}_given`;
  if (!GIVEN.includes(key)) return [];
  const description = `${c.label} as the file gives it`;
  return [
    { ...headerOf(c), name: key, description, bind: givenCell(key) },
    { ...errorHeaderOf(c), name: errorKey(key), bind: givenCell(errorKey(key)) },
  ];
};

/** The columns of a derived table, the same whatever file it is made of. */
export const OUTPUT_COLUMNS: readonly OutputColumn[] = (COLUMNS as readonly Column[]).flatMap((c) => [
  ...asGiven(c),
  ...columnsOf(c),
  ...methodOf(c),
  ...(c.key === "flags" ? [FLAG_WORDS] : []),
]);
