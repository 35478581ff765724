import { type AppError, unprocessable } from "../../errors.ts";

const AGAIN = "Get the file again, or write the table anew with the program that made it, and bring that.";

export const cutOff = (what: string): AppError =>
  unprocessable("file-cut-off", `The file ends too early: ${what}. It was probably cut off on its way.`, {
    hint: "Get the file again and bring it as a new extract.",
  });

/** A header that breaks the rules of the format where the table's shape depends on them. */
export const badHeader = (message: string): AppError =>
  unprocessable("fits-header", message, { hint: AGAIN });

export const notFits = (): AppError =>
  unprocessable("not-fits", "This is not a FITS file: it does not begin with the keyword SIMPLE.", {
    hint: "Bring the file as what it is, or get it again if it should be FITS.",
  });

export const noTable = (contents: string): AppError =>
  unprocessable("fits-no-table", `This FITS file holds no table, only ${contents}.`, {
    hint: "Bring a file that holds a binary table or an ASCII table with one star on a row.",
  });

export const tooLarge = (message: string): AppError =>
  unprocessable("fits-limit", message, {
    hint: "Save the columns that you need as a table of their own, and bring that.",
  });

/** Texts from a file as an error may repeat them: short, and without what a terminal would act on. */
export const quoted = (text: string): string => {
  const plain = text.replace(/[^\x20-\x7e\u00a0-\uffff]/g, "\u00b7");
  return `“${plain.length > 60 ? `${plain.slice(0, 60)}…` : plain}”`;
};

export const counted = (count: number): string => count.toLocaleString("en");
