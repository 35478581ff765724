import { useSuspenseQuery } from "@tanstack/react-query";
import { Link } from "react-router-dom";
import type { TargetList } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";
import { listsOptions } from "#src/api/lists.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Page } from "#src/ui/page.tsx";
import { byStateWords, STATE_LABELS } from "./list-words.ts";

const Row = ({ list, programmeId }: { list: TargetList; programmeId: string }) => (
  <tr>
    <th scope="row" className="border-b border-hair px-2 py-2 text-left align-top font-normal">
      <Link
        to={paths.programme.to(programmeId, "lists", `/${list.id}`)}
        className="font-medium underline decoration-edge underline-offset-4 wrap-anywhere hover:decoration-ink"
      >
        {list.name}
      </Link>
      {list.note ? <span className="block max-w-prose text-xs text-soft">{list.note}</span> : null}
    </th>
    <td className="whitespace-nowrap">{STATE_LABELS[list.state]}</td>
    <td className="text-right">
      <span className="font-mono text-[13px]">{count(list.stars)}</span>
      <span className="block text-xs text-soft">{byStateWords(list)}</span>
    </td>
    <td>
      {list.merit ? `${list.merit.name}, version ${list.merit.number}` : "no figure of merit"}
      <span className="block text-xs text-soft">
        {list.card ? `${list.card.name}${list.campaign ? `, ${list.campaign.name}` : ""}` : "no instrument"}
      </span>
    </td>
    <td className="text-right font-mono text-[13px]">{list.catalogueEdition}</td>
    <td>
      <Moment at={list.madeAt} isShort />
      <span className="block text-xs text-soft">{list.madeBy.name}</span>
    </td>
  </tr>
);

const HEADS = [
  { label: "Target list" },
  { label: "State" },
  { label: "Stars", isNumber: true },
  { label: "Ranked by, as seen by" },
  { label: "Edition", isNumber: true },
  { label: "Made" },
];

const toCatalogue =
  "inline-flex min-h-8 items-center rounded border border-ink bg-ink px-3 py-1 text-[13px] text-paper";

/** All target lists of the programme, the newest first. */
export const ListsPage = () => {
  const programmeId = useProgrammeId();
  const mayMake = useCan()("list.make");
  const { data: lists } = useSuspenseQuery(listsOptions(programmeId));
  const catalogue = paths.programme.to(programmeId, "catalogue");
  return (
    <Page
      title="Target lists"
      lede="Stars in an order, kept with the values they were chosen on."
      actions={
        mayMake && lists.length > 0 ? (
          <Link to={catalogue} className={toCatalogue}>
            Choose stars in the catalogue
          </Link>
        ) : null
      }
    >
      {lists.length === 0 ? (
        <EmptyState
          title="No target list yet."
          actions={
            mayMake ? (
              <Link to={catalogue} className={toCatalogue}>
                Choose stars in the catalogue
              </Link>
            ) : null
          }
        >
          {mayMake
            ? "Cut and rank the catalogue, then make a list of the first stars of what is left."
            : "Making one needs the Scientist or the Lead role."}
        </EmptyState>
      ) : (
        <LedgerTable caption="Target lists" heads={HEADS}>
          {lists.map((list) => (
            <Row key={list.id} list={list} programmeId={programmeId} />
          ))}
        </LedgerTable>
      )}
    </Page>
  );
};
