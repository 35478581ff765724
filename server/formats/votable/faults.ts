import { AppError } from "../../errors.ts";

/** Refusals of the VOTable reader: what and why, then what to do. */

const GET_AGAIN = "Get the file again from its service or archive and bring it as a new extract.";

/** No piece of text, tag or row of a real table comes near this; without a limit one cell could fill the memory. */
export const MOST_CHARACTERS = 4_000_000;

const LONGEST_QUOTE = 80;

/** As much of a text of the file as a message should quote. */
export const short = (text: string, most = LONGEST_QUOTE): string =>
  text.length > most ? `${text.slice(0, most)}…` : text;

export const notVotable = (why: string): AppError =>
  new AppError(422, "not-a-votable", `This is no VOTable: ${why}.`, {
    hint: "Check that the file is the table itself and not a page or a message of the service that was saved instead.",
  });

export const brokenMarkup = (line: number, why: string): AppError =>
  new AppError(
    422,
    "votable-broken",
    `The VOTable cannot be read on line ${line.toLocaleString("en")}: ${why}.`,
    { hint: `${GET_AGAIN} If it stays so, tell whoever made the file of that line.` },
  );

export const endsInMiddle = (line: number, where: string): AppError =>
  new AppError(
    422,
    "file-cut-off",
    `The file ends in the middle, on line ${line.toLocaleString("en")}: ${where}. It was probably cut off on its way.`,
    { hint: GET_AGAIN },
  );

export const brokenRow = (row: number, why: string): AppError =>
  new AppError(
    422,
    "votable-broken",
    `Row ${row.toLocaleString("en")} of the VOTable cannot be read: ${why}. Nothing after it can be trusted.`,
    { hint: `${GET_AGAIN} If it stays so, get the table in its TABLEDATA form.` },
  );

export const tooLong = (line: number, what: string): AppError =>
  new AppError(
    422,
    "votable-too-long",
    `On line ${line.toLocaleString("en")} ${what} is longer than ${MOST_CHARACTERS / 1e6} million characters, or is never closed.`,
    { hint: "Leave that column out when the table is made, or get the file again if it is damaged." },
  );

export const unreadable = (code: string, message: string, hint: string): AppError =>
  new AppError(422, code, message, { hint });
