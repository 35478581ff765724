import type { TableFinding } from "../table.ts";

type Words = Omit<TableFinding, "count" | "examples">;

export const POSITIONS_JOINED: Words = {
  key: "described-positions",
  level: "note",
  message:
    "Hours or degrees, minutes and seconds stand in columns of their own and were made one column of degrees.",
  hint: "Nothing needs to be done.",
};

export const SIXTY_CARRIED: Words = {
  key: "sixty-carried",
  level: "note",
  message: "Minutes or seconds of 60 were carried over.",
  hint: "Nothing needs to be done.",
};

export const PARTS_BLANK: Words = {
  key: "described-parts-blank",
  level: "ask",
  message: "Positions lack their minutes or seconds; they are blank rather than taken for zero.",
  hint: "Look at these rows, and give their positions in full if they are needed.",
};

export const SHORT_LINES: Words = {
  key: "described-short-lines",
  level: "stop",
  message: "Lines are shorter than the description says, so that values are missing from them.",
  hint: "Check that description and data belong together, or get both again.",
};

export const UNMARKED_BLANKS: Words = {
  key: "described-unmarked-blanks",
  level: "note",
  message:
    "Columns of numbers are blank in some rows, although the description does not say that they may be.",
  hint: "Nothing needs to be done; blank is read as no value.",
};

export const UNDECLARED_WORDS: Words = {
  key: "undeclared-blanks",
  level: "note",
  message:
    "Words such as --- stand in columns of numbers where the file declares no mark for a blank; they are read as blanks.",
  hint: "Nothing needs to be done.",
};

export const SECOND_TABLE: Words = {
  key: "described-second-table",
  level: "stop",
  message:
    "The description of another table follows after the rows; it and what stands below it is not read.",
  hint: "Bring each table as a file of its own.",
};

export const BY_BYTES: Words = {
  key: "described-by-bytes",
  level: "note",
  message:
    "Letters of several bytes stand in the rows; columns are counted in bytes, as the values fit only so.",
  hint: "Look at names with accents.",
};
