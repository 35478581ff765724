import { unprocessable } from "../../errors.ts";
import type { TextPiece } from "./text-source.ts";

/** Longer than any row of a table in columns; without a limit one line could fill the memory. */
const MOST_CHARACTERS = 4_000_000;

export interface LineBatch {
  /** Without their ends. */
  readonly lines: readonly string[];
  /** Line of the file, from 1, of the first of them. */
  readonly first: number;
  readonly bytes: number;
  /** Whether the last of them is the file's last and has no end. */
  readonly isOpen: boolean;
}

const tooLong = (line: number): Error =>
  unprocessable(
    "line-too-long",
    `Line ${line.toLocaleString("en")} does not end in ${MOST_CHARACTERS / 1e6} million characters, so it is no row of a table.`,
    { hint: "Export the table again with one row on a line, and bring the file as a new extract." },
  );

/** The lines of a text, in batches of as many as one piece of it completes. */
export async function* linesOf(pieces: AsyncIterable<TextPiece>): AsyncGenerator<LineBatch> {
  let rest = "";
  let first = 1;
  let bytes = 0;
  for await (const piece of pieces) {
    bytes = piece.bytes;
    if (!piece.text.includes("\n")) {
      rest += piece.text;
      if (rest.length > MOST_CHARACTERS) throw tooLong(first);
      continue;
    }
    const lines = (rest + piece.text).split("\n");
    rest = lines.pop() ?? "";
    yield { lines, first, bytes, isOpen: false };
    first += lines.length;
  }
  if (rest !== "") yield { lines: [rest], first, bytes, isOpen: true };
}
