import { unprocessable } from "../../errors.ts";
import { notATable } from "../encoding.ts";
import type { TextSource } from "./text-source.ts";

/** Refuses what is no text, or holds nothing. */
export const checkText = (source: TextSource): void => {
  if (source.head.length === 0 || (source.isWhole && source.headText().trim() === ""))
    throw unprocessable("empty-file", "The file is empty, so it has no line of names.", {
      hint: "Get the file again.",
    });
  const instead = notATable(source.head, source.encoding === "utf-16be" ? "utf-16le" : source.encoding);
  if (instead !== null)
    throw unprocessable("not-a-table", `This is ${instead}, not a table as text.`, {
      hint: "Export the table as CSV or ECSV and read that.",
    });
  if (source.headText() === "")
    throw unprocessable("line-too-long", "The first line does not end where the names of a table would.", {
      hint: "Export the table again with one row on a line, and bring the file as a new extract.",
    });
};
