import { unprocessable } from "../../errors.ts";
import { linesOf } from "../text/text-lines.ts";
import { TextSource } from "../text/text-source.ts";

/** Descriptions are small: a larger file is a mistake. */
const MOST_BYTES = 8 * 1024 * 1024;

/** All of a small text, its line ends made one. */
export const readText = async (bytes: AsyncIterable<Uint8Array>): Promise<string> => {
  const source = await TextSource.open(bytes);
  const lines: string[] = [];
  for await (const batch of linesOf(source.pieces())) {
    lines.push(...batch.lines);
    if (batch.bytes > MOST_BYTES)
      throw unprocessable(
        "description-too-large",
        `The description has more than ${MOST_BYTES / 1024 ** 2} MB, more than descriptions have.`,
        { hint: "Check that description and data were not taken for each other." },
      );
  }
  return lines.join("\n");
};
