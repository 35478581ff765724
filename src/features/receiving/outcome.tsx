import { useState } from "react";
import { Link } from "react-router-dom";
import type { Extract } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { refusedAddress } from "#src/api/extracts.ts";
import { paths } from "#src/app/paths.ts";
import { JobProgress } from "#src/lib/job-progress.tsx";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { ColumnHealth } from "./column-health.tsx";
import { epochText, readingOf } from "./extract-words.ts";
import { LookTabs } from "./look-tabs.tsx";
import { meaningLabel } from "./plan-words.ts";
import { RowSum } from "./row-sum.tsx";
import { SavePlanButton } from "./save-plan-dialog.tsx";
import { WithdrawDialog } from "./withdraw-dialog.tsx";

const titleOf = ({ state, edition }: Extract): string =>
  state === "withdrawn" ? "This extract was withdrawn" : `These stars are in edition ${edition ?? "–"}`;

const Facts = ({ extract }: { extract: Extract }) => (
  <dl className="mt-5 grid max-w-3xl grid-cols-1 gap-x-6 gap-y-1.5 sm:grid-cols-[11rem_minmax(0,1fr)] [&_dt]:text-soft [&_dd]:wrap-anywhere">
    <dt>New stars</dt>
    <dd className="font-mono">{extract.newStars === null ? "–" : count(extract.newStars)}</dd>
    {extract.committedAt ? (
      <>
        <dt>Committed</dt>
        <dd>
          <Moment at={extract.committedAt} />
        </dd>
      </>
    ) : null}
    <dt>File</dt>
    <dd>
      {extract.fileName} <span className="font-mono text-[13px] text-soft">{count(extract.bytes)} bytes</span>
    </dd>
    <dt>sha256</dt>
    <dd className="font-mono text-[13px]">{extract.sha256 ?? "–"}</dd>
    {extract.companion ? (
      <>
        <dt>Description</dt>
        <dd>
          {extract.companion.fileName}{" "}
          <span className="font-mono text-[13px] text-soft">{count(extract.companion.bytes)} bytes</span>
        </dd>
      </>
    ) : null}
    {extract.plan ? (
      <>
        <dt>Read as</dt>
        <dd>{readingOf(extract.plan)}</dd>
      </>
    ) : null}
    <dt>Release of the identifiers</dt>
    <dd>{extract.plan?.release || "not named"}</dd>
    {extract.plan?.epoch == null ? null : (
      <>
        <dt>Epoch of positions</dt>
        <dd className="font-mono">{epochText(extract.plan.epoch)}</dd>
      </>
    )}
  </dl>
);

const ReadAs = ({ extract }: { extract: Extract }) => {
  const used = extract.plan?.columns.filter((c) => c.means !== KEPT) ?? [];
  if (used.length === 0) return null;
  return (
    <details className="mt-5 max-w-3xl">
      <summary className="min-h-6">Read under this plan: {count(used.length)} columns used</summary>
      <ul className="mt-2 columns-1 text-[13px] sm:columns-2">
        {used.map((card) => (
          <li key={card.index} className="break-inside-avoid py-0.5 wrap-anywhere">
            <span className="font-mono text-xs">{card.header}</span> → {meaningLabel(card.means)}
            {card.unit ? <span className="text-soft"> in {card.unit}</span> : null}
            {card.blankMarks.length > 0 ? (
              <span className="text-soft">; blank: {card.blankMarks.join("; ")}</span>
            ) : null}
          </li>
        ))}
      </ul>
    </details>
  );
};

const Refused = ({ extract }: { extract: Extract }) => {
  const programmeId = useProgrammeId();
  const { rows } = extract;
  if (!rows || rows.refused + rows.skipped === 0) return null;
  return (
    <p className="mt-2">
      <a
        href={refusedAddress(programmeId, extract.id)}
        className="inline-block min-h-6 underline underline-offset-4"
      >
        Download the refused rows
      </a>{" "}
      <span className="text-soft">
        and those skipped, with their line, the reason, and the text as it was
      </span>
    </p>
  );
};

/** Where the rows went, what the extract is, and what can be done with it. */
const Report = ({ extract }: { extract: Extract }) => {
  const programmeId = useProgrammeId();
  const can = useCan();
  const [isWithdrawing, setWithdrawing] = useState(false);
  const { job } = extract;
  const hasWithdrawal = job?.kind === "withdraw-extract" && job.state !== "done";
  const isBusy = hasWithdrawal && job.finishedAt === null;
  return (
    <>
      <Refused extract={extract} />
      {hasWithdrawal ? (
        <div className="mt-4 max-w-2xl">
          <JobProgress programmeId={programmeId} jobId={job.id} done="The extract is withdrawn." />
        </div>
      ) : null}
      <Facts extract={extract} />
      <ReadAs extract={extract} />
      <div className="mt-6 flex flex-wrap items-center gap-3">
        {extract.state === "committed" ? (
          <Link
            to={paths.programme.to(programmeId, "catalogue")}
            className="inline-flex min-h-8 items-center rounded border border-ink bg-ink px-3 py-1 text-[13px] text-paper"
          >
            Open the catalogue
          </Link>
        ) : null}
        {extract.state === "committed" && can("extract.edit") && !isBusy ? (
          <Button onClick={() => setWithdrawing(true)}>Withdraw extract</Button>
        ) : null}
        {extract.plan && can("plan.edit") ? <SavePlanButton extract={extract} plan={extract.plan} /> : null}
      </div>
      <WithdrawDialog extract={extract} isOpen={isWithdrawing} onClose={() => setWithdrawing(false)} />
    </>
  );
};

/** What became of a committed extract, row by row in sum and column by column. */
export const Outcome = ({ extract }: { extract: Extract }) => (
  <>
    <h1 className="mb-2 text-[30px]">{titleOf(extract)}</h1>
    {extract.rows ? <RowSum rows={extract.rows} /> : null}
    <div className="mt-4">
      <LookTabs
        label="The extract"
        looks={[
          { key: "report", label: "Report", show: () => <Report extract={extract} /> },
          { key: "columns", label: "Columns", show: () => <ColumnHealth extractId={extract.id} /> },
        ]}
      />
    </div>
  </>
);
