import type { ListMember, TargetList } from "#shared/api/lists.ts";
import { type Column, findColumn } from "#shared/catalogue/columns.ts";
import { count } from "#shared/format/numbers.ts";
import { MeritCell, ValueCell } from "#src/lib/star-cells.tsx";
import type { GridColumn } from "#src/ui/grid/types.ts";
import { MEMBER_LABELS, MEMBER_MARKS } from "./list-words.ts";

const STELLAR = ["g_mag", "teff", "radius", "distance", "hz_inner", "transit_probability"];
const INSTRUMENT = ["transits", "r_min"];

const valueColumn = (column: Column): GridColumn<ListMember> => ({
  key: column.key,
  label: column.label,
  unit: column.unitLabel,
  description: column.description,
  width: column.hasError ? 128 : 88,
  cell: (row) => <ValueCell column={column} row={row} />,
});

/** The columns of a list's grid: place, star, its state in the list, what it was chosen on. */
export const memberColumns = (list: TargetList): GridColumn<ListMember>[] => [
  {
    key: "place",
    label: "#",
    width: 60,
    isFrozen: true,
    description: "Place in the list",
    cell: (row) => <span className="text-faint">{count(row.place)}</span>,
  },
  {
    key: "designation",
    label: "Star",
    width: 128,
    isText: true,
    isFrozen: true,
    isRowHeader: true,
    description: "Name of the star as the preferred extract spells it",
    cell: (row) => row.designation,
  },
  {
    key: "state",
    label: "State",
    width: 96,
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
          width: 158,
          cell: (row: ListMember) => <MeritCell row={row} terms={list.merit?.terms ?? []} />,
        },
      ]
    : []),
  ...[...STELLAR, ...(list.card && list.campaign ? INSTRUMENT : [])].flatMap((key) => {
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
