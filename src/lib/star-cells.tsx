import type { StarRow } from "#shared/api/stars.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { type Column, errorKey } from "#shared/catalogue/columns.ts";
import { fixed, formatCell } from "#shared/format/numbers.ts";
import { MeritStrip } from "./merit-strip.tsx";

/** A blank says why it is blank: a short muted word, the sentence on hover and to a screen reader. */
export const BlankCell = ({ code }: { code: number | undefined }) => {
  const reason = blankReason(code ?? 1);
  return (
    <span className="text-faint" title={reason.sentence}>
      {reason.word}
      <span className="sr-only">: {reason.sentence}</span>
    </span>
  );
};

/** A value in the unit of its column's head, its error in a quieter weight. */
export const ValueCell = ({ column, row }: { column: Column; row: Pick<StarRow, "values" | "blanks"> }) => {
  const value = row.values[column.key];
  if (value === undefined) return <BlankCell code={row.blanks[column.key]} />;
  const shown = formatCell(column, value, row.values[errorKey(column.key)]);
  return (
    <span>
      {shown.value}
      {shown.error === null ? null : <span className="text-[11px] text-faint"> ±{shown.error}</span>}
    </span>
  );
};

/** The merit with what each term adds to it. */
export const MeritCell = ({
  row,
  terms,
}: {
  row: Pick<StarRow, "merit" | "shares">;
  terms: readonly string[];
}) =>
  row.merit === null ? (
    <span className="text-faint" title="A value that the figure of merit holds the star for is blank.">
      held
    </span>
  ) : (
    <span className="flex items-center gap-2">
      <MeritStrip shares={row.shares} terms={terms} />
      <span className="w-11 text-right">{fixed(row.merit, 1)}</span>
    </span>
  );
