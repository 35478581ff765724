import type { TableFinding } from "../table.ts";

type Words = Omit<TableFinding, "count" | "examples">;

export const ENCODING_GUESSED: Words = {
  key: "encoding-guessed",
  level: "note",
  message: "Some bytes are not UTF-8, so the text is read as Latin-1 (Windows-1252).",
  hint: "Look at names with accents; choose another encoding if they are wrong.",
};

export const STRAY_BYTES: Words = {
  key: "stray-bytes",
  level: "ask",
  message: "Some bytes mean nothing in the encoding of the file; each stands as \ufffd.",
  hint: "Look at these places, and choose another encoding or save the file as UTF-8 if they matter.",
};

export const headersRenamed = (count: number): Words => ({
  key: "headers-renamed",
  level: "note",
  message: `${count} columns share a name or have none, and are told apart by a number.`,
  hint: "Nothing needs to be done; the original keeps its names.",
});

export const NO_NAMES: Words = {
  key: "no-names",
  level: "ask",
  message: "The first line holds values like those below it, so the file seems to have no names of columns.",
  hint: "Say what each column is, or write a line of names above the rows and bring the file anew.",
};

export const NAMES_IN_COMMENT: Words = {
  key: "names-in-comment",
  level: "note",
  message: "The names of the columns were taken from a comment above the rows.",
  hint: "Check the first rows against the names.",
};

export const UNITS_LINE: Words = {
  key: "units-line",
  level: "note",
  message: "The line below the names was taken for their units and is no row.",
  hint: "Check the units.",
};

export const COMMENT_LINES: Words = {
  key: "comment-lines",
  level: "note",
  message: "Lines between or after the rows begin with the mark of a comment and were passed over.",
  hint: "Take the mark away where such a line is a row.",
};

export const FEWER_ROWS: Words = {
  key: "fewer-rows",
  level: "stop",
  message: "The file says it has more rows than it holds, so rows are missing.",
  hint: "Get the file again from its archive and bring it as a new extract.",
};

export const MORE_ROWS: Words = {
  key: "more-rows",
  level: "ask",
  message: "The file holds more rows than it says it has.",
  hint: "Check that the file was not put together from several answers.",
};

export const OPEN_END: Words = {
  key: "open-end",
  level: "note",
  message: "The last line has no end. If the file was cut off there, its last value is shortened.",
  hint: "Compare the last row with the original, or get the file again.",
};

export const TWO_READINGS: Words = {
  key: "two-readings",
  level: "ask",
  message: "The rows part equally well in two ways, so the delimiter is not certain.",
  hint: "Look at the first rows, and choose the delimiter if they are wrong.",
};
