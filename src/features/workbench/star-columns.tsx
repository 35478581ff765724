import type { ReactNode } from "react";
import type { Histogram, StarRow } from "#shared/api/stars.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { type Column, errorKey, findColumn } from "#shared/catalogue/columns.ts";
import { count, fixed, formatCell } from "#shared/format/numbers.ts";
import { declinationText, rightAscensionText } from "#shared/format/sexagesimal.ts";
import { HeadHistogram } from "#src/ui/grid/histogram.tsx";
import type { GridColumn } from "#src/ui/grid/types.ts";
import { MeritStrip } from "./merit-strip.tsx";

/** A blank says why it is blank: a short muted word, the sentence on hover and to a screen reader. */
const Blank = ({ code }: { code: number | undefined }) => {
  const reason = blankReason(code ?? 1);
  return (
    <span className="text-faint" title={reason.sentence}>
      {reason.word}
    </span>
  );
};

const Value = ({ column, row }: { column: Column; row: StarRow }) => {
  const value = row.values[column.key];
  if (value === undefined) return <Blank code={row.blanks[column.key]} />;
  const shown = formatCell(column, value, row.values[errorKey(column.key)]);
  return (
    <span>
      {shown.value}
      {shown.error === null ? null : <span className="text-[11px] text-faint"> ±{shown.error}</span>}
    </span>
  );
};

const position = (column: Column, row: StarRow): ReactNode => {
  const value = row.values[column.key];
  if (value === undefined) return <Blank code={row.blanks[column.key]} />;
  return column.key === "ra" ? rightAscensionText(value, 2) : declinationText(value, 1);
};

const textOf = (column: Column, row: StarRow): ReactNode => {
  const text =
    column.key === "source_id" ? row.sourceId : column.key === "release" ? row.release : row.designation;
  return text ?? <Blank code={undefined} />;
};

const isSky = (key: string): boolean => key === "ra" || key === "dec";

const widthOf = (column: Column, isSexagesimal: boolean): number => {
  if (column.key === "source_id") return 190;
  if (column.kind === "text") return 150;
  if (isSky(column.key)) return isSexagesimal ? 126 : 104;
  return column.hasError && column.stage !== "instrument" ? 136 : 96;
};

const registryColumn = (
  column: Column,
  isSexagesimal: boolean,
  histogram: Histogram | undefined,
): GridColumn<StarRow> => ({
  key: column.key,
  label: column.label,
  unit: isSky(column.key) && isSexagesimal ? (column.key === "ra" ? "h m s" : "° ′ ″") : column.unitLabel,
  description: `${column.description}${histogram ? `. ${count(histogram.blanks)} blank` : ""}`,
  width: widthOf(column, isSexagesimal),
  isText: column.kind === "text",
  canSort: true,
  picture: histogram ? <HeadHistogram all={histogram.all} selected={histogram.selected} /> : undefined,
  cell: (row) => {
    if (column.kind === "text") return textOf(column, row);
    return isSky(column.key) && isSexagesimal ? position(column, row) : <Value column={column} row={row} />;
  },
});

interface Options {
  keys: readonly string[];
  terms: readonly string[];
  isSexagesimal: boolean;
  histograms: readonly Histogram[];
}

const scoreColumn = (terms: readonly string[], histogram: Histogram | undefined): GridColumn<StarRow> => ({
  key: "merit",
  label: "Merit",
  unit: "0–100",
  description: "Figure of merit, with the share of each term",
  width: 158,
  canSort: true,
  picture: histogram ? <HeadHistogram all={histogram.all} selected={histogram.selected} /> : undefined,
  cell: (row) =>
    row.merit === null ? (
      <span className="text-faint" title="A value that the figure of merit holds the star for is blank.">
        held
      </span>
    ) : (
      <span className="flex items-center gap-2">
        <MeritStrip shares={row.shares} terms={terms} />
        <span className="w-11 text-right">{fixed(row.merit, 1)}</span>
      </span>
    ),
});

/** The columns of the workbench's grid. */
export const starColumns = ({ keys, terms, isSexagesimal, histograms }: Options): GridColumn<StarRow>[] => {
  const pictureOf = (key: string) => histograms.find((h) => h.key === key);
  return [
    {
      key: "place",
      label: "#",
      width: 64,
      isFrozen: true,
      description: "Place in this order",
      cell: (row) => <span className="text-faint">{count(row.place)}</span>,
    },
    {
      key: "designation",
      label: "Star",
      width: 128,
      isText: true,
      isFrozen: true,
      isRowHeader: true,
      canSort: true,
      description: "Name of the star as the preferred extract spells it",
      cell: (row) => row.designation,
    },
    ...(terms.length > 0 ? [scoreColumn(terms, pictureOf("merit"))] : []),
    ...keys.flatMap((key) => {
      const column = findColumn(key);
      return column && key !== "designation" ? [registryColumn(column, isSexagesimal, pictureOf(key))] : [];
    }),
  ];
};
