import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { useSearchParams } from "react-router-dom";
import type { ColumnHealth as Health } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { healthOptions } from "#src/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { figureText } from "./extract-words.ts";
import { meaningLabel } from "./plan-words.ts";
import { ValueHistogram } from "./value-histogram.tsx";

/** Rows drawn at first; a file may have 3 000 columns. */
const PORTION = 100;
/** Marks written out beside each other; more are counted. */
const MARKS = 3;

const figure = (value: number | null): string => (value === null ? "–" : figureText(value));
const markText = (mark: string): string => (mark === "" ? "empty" : mark);

const Blanks = ({ blanks }: Pick<Health, "blanks">) => {
  if (blanks.length === 0) return <span className="text-soft">none</span>;
  const sorted = [...blanks].sort((a, b) => b.count - a.count);
  return (
    <>
      {sorted.slice(0, MARKS).map(({ mark, count: n }) => (
        <span key={mark} className="mr-3 inline-block whitespace-nowrap">
          <span className="text-soft">{markText(mark)}</span> {count(n)}
        </span>
      ))}
      {sorted.length > MARKS ? (
        <span className="text-soft">and {sorted.length - MARKS} other marks</span>
      ) : null}
    </>
  );
};

/** A histogram the height of a row; the words stand beside the large one. */
const Spark = ({ histogram }: Pick<Health, "histogram">) => {
  const most = Math.max(1, ...histogram);
  return (
    <svg
      viewBox={`0 0 ${Math.max(1, histogram.length)} 20`}
      preserveAspectRatio="none"
      className="h-5 w-28"
      aria-hidden="true"
    >
      {histogram.map((n, i) => (
        <rect
          // biome-ignore lint/suspicious/noArrayIndexKey: the bars of a histogram stay where they are
          key={i}
          x={i + 0.08}
          width={0.84}
          y={20 - (n === 0 ? 0 : Math.max(1, 20 * Math.sqrt(n / most)))}
          height={n === 0 ? 0 : Math.max(1, 20 * Math.sqrt(n / most))}
          fill="var(--faint)"
        />
      ))}
    </svg>
  );
};

const HEADS = ["In the file", "Means", "Values", "Blank", "Least", "Median", "Greatest", "Spread"];
const NUMBERS = new Set(["Values", "Least", "Median", "Greatest"]);

const Row = ({ column, isOpen, onOpen }: { column: Health; isOpen: boolean; onOpen: () => void }) => (
  <tr className={isOpen ? "bg-sel" : undefined}>
    <th scope="row" className="max-w-48 text-left font-mono text-xs font-normal">
      <button
        type="button"
        aria-pressed={isOpen}
        onClick={onOpen}
        className="block min-h-6 max-w-full truncate text-left underline decoration-edge underline-offset-4 hover:decoration-ink"
      >
        {column.header}
      </button>
    </th>
    <td className={`text-[13px] ${column.means === KEPT ? "text-soft" : ""}`}>
      {meaningLabel(column.means)}
      {column.unit ? <span className="text-soft">, {column.unit}</span> : null}
    </td>
    <td className="text-right font-mono text-xs">{count(column.values)}</td>
    <td className="font-mono text-xs">
      <Blanks blanks={column.blanks} />
    </td>
    <td className="text-right font-mono text-xs whitespace-nowrap">{figure(column.low)}</td>
    <td className="text-right font-mono text-xs whitespace-nowrap">{figure(column.median)}</td>
    <td className="text-right font-mono text-xs whitespace-nowrap">{figure(column.high)}</td>
    <td>{column.histogram.length > 0 ? <Spark histogram={column.histogram} /> : null}</td>
  </tr>
);

const Opened = ({ column }: { column: Health }) => {
  const { low, high, histogram } = column;
  return (
    <section aria-label={`Column ${column.header}`} className="mt-5">
      <h2 className="mb-1 text-[21px] wrap-anywhere">{column.header}</h2>
      <p className="mb-3 text-soft">
        {count(column.values)} values in {count(column.rows)} rows
        {column.blanks.map(
          ({ mark, count: n }) => `; ${count(n)} blank by ${mark === "" ? "an empty cell" : mark}`,
        )}
        .
      </p>
      {low !== null && high !== null && histogram.length > 0 ? (
        <ValueHistogram bins={{ low, high, counts: histogram }} unit={column.unit} />
      ) : (
        <p className="text-soft">Its values are texts, or there are none: no histogram is drawn.</p>
      )}
    </section>
  );
};

const Table = ({ columns }: { columns: Health[] }) => {
  const [params, setParams] = useSearchParams();
  const [search, setSearch] = useState("");
  const [portions, setPortions] = useState(1);
  const word = search.trim().toLowerCase();
  const found = columns.filter(
    (c) => c.header.toLowerCase().includes(word) || meaningLabel(c.means).toLowerCase().includes(word),
  );
  const shown = found.slice(0, portions * PORTION);
  const opened = columns.find((c) => c.header === params.get("column"));
  const open = (header: string) =>
    setParams((before) => new URLSearchParams({ ...Object.fromEntries(before), column: header }), {
      replace: true,
    });
  return (
    <>
      {opened ? <Opened column={opened} /> : null}
      <input
        type="text"
        aria-label="Find a column"
        placeholder="Find a column"
        value={search}
        onChange={(event) => setSearch(event.target.value)}
        className="my-3 min-h-7 w-44 rounded border border-edge bg-sheet px-2 text-[13px]"
      />
      <div className="overflow-x-auto border-b border-hair">
        <table className="w-full min-w-[820px] border-collapse text-left">
          <caption className="sr-only">What the committed rows hold, column by column</caption>
          <thead>
            <tr className="bg-sheet">
              {HEADS.map((head) => (
                <th
                  key={head}
                  scope="col"
                  className={`border-b border-rule px-2.5 py-2 font-mono text-xs font-semibold ${NUMBERS.has(head) ? "text-right" : ""}`}
                >
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody className="[&_td]:border-b [&_td]:border-hair [&_td]:px-2.5 [&_td]:py-1 [&_th]:border-b [&_th]:border-hair [&_th]:px-2.5">
            {shown.map((column) => (
              <Row
                key={column.header}
                column={column}
                isOpen={column === opened}
                onOpen={() => open(column.header)}
              />
            ))}
          </tbody>
        </table>
      </div>
      {found.length === 0 ? <p className="py-6 text-soft">No column fits.</p> : null}
      {found.length > shown.length ? (
        <Button className="mt-3" onClick={() => setPortions(portions + 1)}>
          Show {count(Math.min(PORTION, found.length - shown.length))} more of{" "}
          {count(found.length - shown.length)}
        </Button>
      ) : null}
    </>
  );
};

/** What the committed rows of an extract hold: counts, blanks by their marks, range and spread of each column. */
export const ColumnHealth = ({ extractId }: { extractId: string }) => {
  const { data, error, refetch } = useQuery(healthOptions(useProgrammeId(), extractId));
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  if (!data) return <Loading what="Reading what the columns hold" />;
  if (data.length === 0)
    return (
      <p className="py-4 text-soft">
        Nothing was counted when this extract was committed. The rows themselves are in the catalogue.
      </p>
    );
  return <Table columns={data} />;
};
