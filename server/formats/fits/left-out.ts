import { columnName } from "./columns.ts";
import type { Findings } from "./findings.ts";
import type { FitsHeader } from "./header.ts";

/** Why a column cannot become one value for each star. */
export type LeftOut = "variable" | "array" | "complex" | "empty" | "scale";

const WORDS: Record<LeftOut, { message: string; hint: string }> = {
  variable: {
    message:
      "Columns of arrays of varying length are left out: a star has one value for each column, and theirs stand behind the rows of the table.",
    hint: "If you need one of their elements, write it as a column of its own, and bring the file anew.",
  },
  array: {
    message: "Columns with several values in each row are left out: a star has one value for each column.",
    hint: "If you need one of their elements, write it as a column of its own, and bring the file anew.",
  },
  complex: {
    message: "Columns of complex numbers are left out: a star has one value for each column.",
    hint: "Write the real or the imaginary part as a column of its own, and bring the file anew.",
  },
  empty: {
    message: "Columns without any values are left out: their form gives them no room in a row.",
    hint: "Nothing, unless they should hold something; then get the file again.",
  },
  scale: {
    message:
      "Columns whose TSCAL or TZERO is no usable number are left out: their stored numbers mean nothing without it.",
    hint: "Correct TSCAL and TZERO in the file, and bring it anew.",
  },
};

export const leaveOut = (why: LeftOut, header: FitsHeader, place: number, findings: Findings): null => {
  const form = header.text(`TFORM${place}`) ?? "";
  findings.add(
    { key: `fits-left-out-${why}`, level: why === "scale" ? "ask" : "note", ...WORDS[why] },
    `${columnName(header, place)} (${form})`,
  );
  return null;
};
