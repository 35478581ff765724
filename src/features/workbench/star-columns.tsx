import type { ReactNode } from "react";
import type { Histogram, StarRow } from "#shared/api/stars.ts";
import { type Column, findColumn } from "#shared/catalogue/columns.ts";
import { count } from "#shared/format/numbers.ts";
import { declinationText, rightAscensionText } from "#shared/format/sexagesimal.ts";
import { BlankCell, MeritCell, ValueCell } from "#src/lib/star-cells.tsx";
import { HeadHistogram } from "#src/ui/grid/histogram.tsx";
import type { GridColumn } from "#src/ui/grid/types.ts";

const position = (column: Column, row: StarRow): ReactNode => {
  const value = row.values[column.key];
  if (value === undefined) return <BlankCell code={row.blanks[column.key]} />;
  return column.key === "ra" ? rightAscensionText(value, 2) : declinationText(value, 1);
};

const textOf = (column: Column, row: StarRow): ReactNode => {
  const text =
    column.key === "source_id" ? row.sourceId : column.key === "release" ? row.release : row.designation;
  return text ?? <BlankCell code={undefined} />;
};

const isSky = (key: string): boolean => key === "ra" || key === "dec";

const widthOf = (column: Column, isSexagesimal: boolean): number => {
  if (column.key === "source_id") return 190;
  if (column.kind === "text") return 150;
  if (isSky(column.key)) return isSexagesimal ? 126 : 98;
  if (column.group === "brightness" && column.stage === "given") return 104;
  return column.hasError ? 122 : 88;
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
    return isSky(column.key) && isSexagesimal ? (
      position(column, row)
    ) : (
      <ValueCell column={column} row={row} />
    );
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
  cell: (row) => <MeritCell row={row} terms={terms} />,
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
