import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { StarRow } from "#shared/api/stars.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { readWindow, windowKey } from "#src/api/stars.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import type { GridColumn, GridSort } from "#src/ui/grid/types.ts";
import { Loading } from "#src/ui/loading.tsx";

const PAGE = 50;

interface Props {
  programmeId: string;
  view: ViewSpec;
  total: number;
  label: string;
  columns: readonly GridColumn<StarRow>[];
  sort: GridSort;
  onSort: (key: string) => void;
  onOpen: (row: StarRow) => void;
}

const sortOf = (key: string, sort: GridSort) =>
  sort.key === key ? (sort.direction === "asc" ? "ascending" : "descending") : undefined;

/** The same table as native pages of fifty rows, for readers that lose count in a grid. */
export const PlainPages = ({ programmeId, view, total, label, columns, sort, onSort, onOpen }: Props) => {
  const [page, setPage] = useState(0);
  const pages = Math.max(1, Math.ceil(total / PAGE));
  const at = Math.min(page, pages - 1);
  const {
    data: rows = [],
    error,
    isPending,
  } = useQuery({
    queryKey: [...windowKey(programmeId, view), "page", at],
    queryFn: ({ signal }) => readWindow(programmeId, view, at * PAGE, PAGE, signal),
    placeholderData: keepPreviousData,
  });
  return (
    <div className="min-h-0 grow overflow-auto px-5 py-3">
      {error ? <ErrorNotice error={error} /> : null}
      {isPending ? <Loading what="Reading the page" /> : null}
      <table className="border-collapse font-mono text-[12.5px]">
        <caption className="pb-2 text-left font-sans text-soft">
          {label}. Page {count(at + 1)} of {count(pages)}.
        </caption>
        <thead>
          <tr>
            {columns.map((c) => (
              <th
                key={c.key}
                scope="col"
                aria-sort={sortOf(c.key, sort)}
                className={`border-b border-rule px-2.5 py-1.5 font-medium ${c.isText ? "text-left" : "text-right"}`}
              >
                {c.canSort ? (
                  <button
                    type="button"
                    className="min-h-6 underline decoration-edge underline-offset-4"
                    onClick={() => onSort(c.key)}
                  >
                    {c.label}
                  </button>
                ) : (
                  c.label
                )}{" "}
                <span className="text-faint">{c.unit}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id}>
              {columns.map((c) => {
                const style = `border-b border-hair px-2.5 py-1 whitespace-nowrap ${c.isText ? "text-left" : "text-right"}`;
                return c.isRowHeader ? (
                  <th key={c.key} scope="row" className={`${style} font-normal`}>
                    <button
                      type="button"
                      className="min-h-6 underline decoration-edge underline-offset-4"
                      onClick={() => onOpen(row)}
                    >
                      {row.designation}
                    </button>
                  </th>
                ) : (
                  <td key={c.key} className={style}>
                    {c.cell(row)}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
      <div className="mt-3 flex gap-2">
        <Button disabled={at === 0} onClick={() => setPage(at - 1)}>
          Previous page
        </Button>
        <Button disabled={at >= pages - 1} onClick={() => setPage(at + 1)}>
          Next page
        </Button>
      </div>
    </div>
  );
};
