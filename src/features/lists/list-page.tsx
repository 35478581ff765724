import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Link, useLocation, useParams } from "react-router-dom";
import { z } from "zod";
import type { ListMember, TargetList } from "#shared/api/lists.ts";
import { ApiError } from "#src/api/client.ts";
import { listOptions } from "#src/api/lists.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { ListActions } from "./list-actions.tsx";
import { isOpenToChange } from "./list-words.ts";
import { MemberDialog } from "./member-dialog.tsx";
import { MembersCard } from "./members-card.tsx";
import { Provenance } from "./provenance.tsx";
import { SkyMap } from "./sky-map.tsx";
import { StateLedger } from "./state-ledger.tsx";

const Head = ({ programmeId, list }: { programmeId: string; list: TargetList }) => (
  <header className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
    <div className="min-w-0">
      <p className="text-xs text-soft">
        <Link
          to={paths.programme.to(programmeId, "lists")}
          className="underline decoration-edge underline-offset-4 hover:text-ink"
        >
          Target lists
        </Link>
        {isOpenToChange(list) ? " · not signed yet" : ""}
      </p>
      <h1 className="text-[34px] leading-tight wrap-anywhere">{list.name}</h1>
      {list.note ? <p className="mt-1 max-w-2xl text-soft wrap-anywhere">{list.note}</p> : null}
    </div>
    <ListActions programmeId={programmeId} list={list} />
  </header>
);

/** What the making of the list had to say, where one comes from there. */
const remarkOf = (state: unknown): string | null => {
  const parsed = z.object({ remark: z.string() }).safeParse(state);
  return parsed.success ? parsed.data.remark : null;
};

const Open = ({ programmeId, list }: { programmeId: string; list: TargetList }) => {
  const mayEdit = useCan()("list.edit");
  const [member, setMember] = useState<ListMember | null>(null);
  const remark = remarkOf(useLocation().state);
  return (
    <main className="grid min-h-full xl:h-full xl:grid-cols-[minmax(0,1fr)_24rem]">
      <title>{`${list.name} · Shortlight`}</title>
      <div className="flex min-h-0 min-w-0 flex-col gap-4 px-5 py-5 sm:px-7 xl:overflow-auto">
        <Head programmeId={programmeId} list={list} />
        {remark ? (
          <p role="status" className="rounded bg-sel px-3 py-2">
            {remark}
          </p>
        ) : null}
        <StateLedger list={list} />
        <div className="grid min-h-0 grow gap-6 2xl:grid-cols-[minmax(0,1fr)_24rem] 2xl:grid-rows-[minmax(24rem,1fr)]">
          <MembersCard programmeId={programmeId} list={list} openId={member?.id ?? null} onOpen={setMember} />
          <section
            aria-label="Where they are"
            className="w-full max-w-xl self-start rounded border border-rule bg-sheet px-4 py-3"
          >
            <h2 className="text-[21px]">Where they are</h2>
            <p className="text-xs text-soft">equal-area, right ascension grows to the left</p>
            <SkyMap programmeId={programmeId} listId={list.id} />
          </section>
        </div>
      </div>
      <aside className="border-t border-rule bg-sheet px-5 py-5 xl:overflow-auto xl:border-t-0 xl:border-l">
        <Provenance programmeId={programmeId} list={list} />
      </aside>
      {member ? (
        <MemberDialog
          key={member.id}
          programmeId={programmeId}
          list={list}
          member={member}
          mayEdit={mayEdit}
          onClose={() => setMember(null)}
        />
      ) : null}
    </main>
  );
};

/** One target list: its state, its stars, where they are, and what it was made from. */
export const ListPage = () => {
  const programmeId = useProgrammeId();
  const { listId = "" } = useParams();
  const list = useQuery(listOptions(programmeId, listId));
  if (list.isPending) return <Loading what="Reading the list" />;
  if (list.error instanceof ApiError && list.error.status === 404)
    return (
      <EmptyState
        title="This target list is not here."
        actions={
          <Link className="underline" to={paths.programme.to(programmeId, "lists")}>
            See the target lists there are
          </Link>
        }
      >
        It may have been deleted, or the link may be cut off.
      </EmptyState>
    );
  if (list.isError) return <ErrorNotice error={list.error} onRetry={() => void list.refetch()} isPage />;
  return <Open key={list.data.id} programmeId={programmeId} list={list.data} />;
};
