import { useState } from "react";
import type { LogbookLine } from "#shared/api/programmes.ts";
import { count } from "#shared/format/numbers.ts";
import { type Difference, deedOf, differencesOf } from "#src/lib/logbook-words.ts";
import { Moment } from "#src/ui/moment.tsx";

const SHORT_HASH = 12;

const Side = ({ word, text }: { word: string; text: string }) => (
  <div>
    <span className="text-xs text-soft">{word}</span>
    <pre className="font-mono text-[12.5px] whitespace-pre-wrap wrap-anywhere">{text}</pre>
  </div>
);

const DifferenceText = ({ name, before, after }: Difference) => (
  <div className="grid gap-x-6 border-t border-hair py-2 sm:grid-cols-[9rem_1fr_1fr]">
    <dt className="font-mono text-[13px]">{name}</dt>
    <dd>{before === null ? null : <Side word="before" text={before} />}</dd>
    <dd>{after === null ? null : <Side word="after" text={after} />}</dd>
  </div>
);

const Opened = ({ line, differences }: { line: LogbookLine; differences: readonly Difference[] }) => (
  <tr>
    <td className="max-sm:hidden" />
    <td colSpan={4}>
      <dl>
        {differences.map((difference) => (
          <DifferenceText key={difference.name} {...difference} />
        ))}
      </dl>
      <p className="border-t border-hair pt-2 text-xs text-soft">
        Fingerprint <span className="font-mono wrap-anywhere">{line.hash}</span>
      </p>
    </td>
  </tr>
);

/** One line; what was before and after opens below it. */
export const LogbookRow = ({ line }: { line: LogbookLine }) => {
  const [isOpen, setOpen] = useState(false);
  const differences = differencesOf(line);
  return (
    <>
      <tr>
        <td className="text-right font-mono text-[13px] text-soft max-sm:hidden">{count(line.sequence)}</td>
        <td>
          <Moment at={line.at} isShort />
        </td>
        <td className="min-w-16 wrap-anywhere">{line.actor}</td>
        <td className="min-w-20 wrap-anywhere">{deedOf(line)}</td>
        <td>
          <button
            type="button"
            aria-expanded={isOpen}
            onClick={() => setOpen(!isOpen)}
            className="min-h-6 text-left whitespace-nowrap underline decoration-edge underline-offset-4 hover:decoration-ink"
          >
            {isOpen ? "Hide" : "Show"}
            <span className="sr-only"> line {line.sequence}</span>
            <span className="ml-2 inline-block font-mono text-xs text-soft no-underline max-sm:hidden">
              {line.hash.slice(0, SHORT_HASH)}
            </span>
          </button>
        </td>
      </tr>
      {isOpen ? <Opened line={line} differences={differences} /> : null}
    </>
  );
};
