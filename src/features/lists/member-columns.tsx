import type { ListMember, TargetList } from "#shared/api/lists.ts";
import { type Column, findColumn } from "#shared/catalogue/columns.ts";
import { count } from "#shared/format/numbers.ts";
import { MeritCell, ValueCell } from "#src/lib/star-cells.tsx";
import type { GridColumn } from "#src/ui/grid/types.ts";
import { MEMBER_LABELS, MEMBER_MARKS } from "./list-words.ts";

const INSTRUMENT = ["r_min", "transits"];
const STELLAR = ["g_mag", "teff", "radius", "distance", "hz_inner", "transit_probability"];
/** Room for a value with its error, px, by column; others are narrow. */
const WIDTHS: Readonly<Record<string, number>> = {
  r_min: 122,
  teff: 104,
  g_mag: 92,
  distance: 126,
  radius: 126,
  hz_inner: 136,
};

const valueColumn = (column: Column): GridColumn<ListMember> => ({
  key: column.key,
  label: column.label,
  unit: column.unitLabel,
  description: column.description,
  width: WIDTHS[column.key] ?? 88,
  cell: (row) => <ValueCell column={column} row={row} />,
});

/** The columns of a list's grid: place, star, its state in the list, what it was chosen on. */
export const memberColumns = (list: TargetList): GridColumn<ListMember>[] => [
  {
    key: "place",
    label: "#",
    width: 72,
    isFrozen: true,
    description: "Place in the list",
    cell: (row) => <span className="text-faint">{count(row.place)}</span>,
  },
  {
    key: "designation",
    label: "Star",
    width: 116,
    isText: true,
    isFrozen: true,
    isRowHeader: true,
    description: "Name of the star as the preferred extract spells it",
    cell: (row) => row.designation,
  },
  {
    key: "state",
    label: "State",
    width: 86,
    isText: true,
    description: "In, Reserve, Held or Out",
    cell: (row) => (
      <span className={row.state === "in" ? "" : "text-mark"}>
        <span aria-hidden="true">{MEMBER_MARKS[row.state]} </span>
        {MEMBER_LABELS[row.state]}
      </span>
    ),
  },
  ...(list.merit
    ? [
        {
          key: "merit",
          label: "Merit",
          unit: "0–100",
          description: "Figure of merit, with the share of each term",
          width: 150,
          cell: (row: ListMember) => <MeritCell row={row} terms={list.merit?.terms ?? []} />,
        },
      ]
    : []),
  ...[...(list.card && list.campaign ? INSTRUMENT : []), ...STELLAR].flatMap((key) => {
    const column = findColumn(key);
    return column ? [valueColumn(column)] : [];
  }),
  {
    key: "reason",
    label: "Reason",
    width: 260,
    isText: true,
    description: "Why the star has its state",
    cell: (row) => (
      <span className="font-sans text-[13px]" title={row.reason}>
        {row.reason}
      </span>
    ),
  },
];
