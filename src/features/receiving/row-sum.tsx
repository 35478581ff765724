import type { Extract } from "#shared/api/extracts.ts";
import { count } from "#shared/format/numbers.ts";

/** Where every row of the file went, as a sum that adds up. */
export const RowSum = ({ rows }: { rows: NonNullable<Extract["rows"]> }) => (
  <p className="flex flex-wrap items-baseline gap-x-2 gap-y-1 font-mono text-[17px]">
    {(
      [
        ["", rows.read, "rows read"],
        ["=", rows.accepted, "accepted"],
        ["+", rows.refused, "refused"],
        ["+", rows.skipped, "skipped"],
      ] as const
    ).map(([sign, n, word]) => (
      <span key={word} className="whitespace-nowrap">
        {sign ? `${sign} ` : ""}
        {count(n)} <span className="font-sans text-xs text-soft">{word}</span>
      </span>
    ))}
  </p>
);
