import { useSuspenseQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Link, useSearchParams } from "react-router-dom";
import type { Merit } from "#shared/api/merits.ts";
import { LIMITS } from "#shared/limits.ts";
import { meritsOptions } from "#src/api/merits.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { MeritEditor } from "./merit-editor.tsx";

const NEW = "new";

const entry = (isOpen: boolean): string =>
  `block border-l-2 px-3 py-2.5 hover:bg-sel ${isOpen ? "border-mark bg-sel" : "border-transparent"}`;

const Ledger = ({ merits, open, mayEdit }: { merits: Merit[]; open: string; mayEdit: boolean }) => (
  <nav aria-label="Figures of merit">
    <ul>
      {merits.map((merit) => (
        <li key={merit.id} className="border-b border-hair">
          <Link
            to={`?open=${merit.id}`}
            aria-current={open === merit.id ? "page" : undefined}
            className={entry(open === merit.id)}
          >
            <span className="block font-medium wrap-anywhere">{merit.name}</span>
            <span className="block text-xs text-soft">
              version {merit.number}, {merit.terms.length} {merit.terms.length === 1 ? "term" : "terms"}
            </span>
          </Link>
        </li>
      ))}
      {mayEdit ? (
        <li>
          <Link
            to={`?open=${NEW}`}
            aria-current={open === NEW ? "page" : undefined}
            className={entry(open === NEW)}
          >
            New figure of merit
          </Link>
        </li>
      ) : null}
    </ul>
  </nav>
);

const Nothing = ({ mayEdit }: { mayEdit: boolean }) => (
  <EmptyState
    title="No figure of merit yet."
    actions={
      mayEdit ? (
        <Link
          to={`?open=${NEW}`}
          className="inline-flex min-h-8 items-center rounded border border-ink bg-ink px-3 py-1 text-[13px] text-paper"
        >
          New figure of merit
        </Link>
      ) : null
    }
  >
    A figure of merit ranks stars by named terms, each with a shape and a weight.
    {mayEdit ? "" : " Making one needs the Scientist or the Lead role."}
  </EmptyState>
);

const SavedBy = ({ merit }: { merit: Merit }) => (
  <p className="mt-1 text-soft">
    Version {merit.number}, saved by {merit.savedBy.name} on <Moment at={merit.savedAt} />. Lists made with an
    earlier version keep it.
  </p>
);

/** The figures of merit of the programme, and one of them open. */
export const MeritPage = () => {
  const programmeId = useProgrammeId();
  const mayEdit = useCan()("merit.edit");
  const { data: merits } = useSuspenseQuery(meritsOptions(programmeId));
  const [params, setParams] = useSearchParams();
  /** Counts beginnings: what is typed survives what others save, until the person begins again. */
  const [opening, setOpening] = useState(0);
  const reopen = () => setOpening((n) => n + 1);
  const asked = params.get("open");
  const open = asked ?? merits[0]?.id ?? "";
  const merit = merits.find((m) => m.id === open) ?? null;
  const isNew = open === NEW && mayEdit;
  const title = isNew ? "New figure of merit" : (merit?.name ?? "Merit");
  return (
    <main className="mx-auto w-full max-w-6xl px-5 py-6">
      <title>{`${title} · Shortlight`}</title>
      <div className="grid gap-x-8 gap-y-6 lg:grid-cols-[14rem_minmax(0,1fr)]">
        <div>
          <p className="mb-2 font-serif text-[22px]">Figures of merit</p>
          <Ledger merits={merits} open={open} mayEdit={mayEdit} />
        </div>
        <div className="min-w-0">
          {merit || isNew ? (
            <>
              <h1 className="text-[32px] wrap-anywhere">{title}</h1>
              {merit ? <SavedBy merit={merit} /> : null}
              {mayEdit ? null : (
                <p className="mt-1 text-soft">
                  You can read it. Changing it needs the Scientist or the Lead role.
                </p>
              )}
              <div className="mt-5">
                <MeritEditor
                  key={`${merit?.id ?? NEW} ${opening}`}
                  programmeId={programmeId}
                  merit={merit}
                  mayEdit={mayEdit}
                  mostTerms={LIMITS.meritTerms}
                  onReopen={reopen}
                  onSaved={(saved) => {
                    reopen();
                    setParams({ open: saved.id }, { replace: isNew });
                  }}
                />
              </div>
            </>
          ) : (
            <>
              <h1 className="text-[32px]">Merit</h1>
              {asked && merits.length > 0 ? (
                <p className="mt-2 text-soft">
                  The figure of merit in this link does not exist, or you may not see it. Choose one at the
                  left.
                </p>
              ) : (
                <Nothing mayEdit={mayEdit} />
              )}
            </>
          )}
        </div>
      </div>
    </main>
  );
};
