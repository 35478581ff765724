import { useSuspenseQuery } from "@tanstack/react-query";
import { useState } from "react";
import { Link } from "react-router-dom";
import type { Extract } from "#shared/api/extracts.ts";
import { count } from "#shared/format/numbers.ts";
import { extractsOptions } from "#src/api/extracts.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { LedgerTable } from "#src/ui/ledger-table.tsx";
import { Moment } from "#src/ui/moment.tsx";
import { Page } from "#src/ui/page.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { STATE_WORDS, shareOf } from "./extract-words.ts";
import { ReadFileDialog } from "./read-file-dialog.tsx";

const HEADS = [
  { label: "No.", isNumber: true },
  { label: "Extract" },
  { label: "State" },
  { label: "Rows read = accepted + refused + skipped", isNumber: true, isWideOnly: true },
  { label: "New stars", isNumber: true, isWideOnly: true },
  { label: "Edition", isNumber: true, isWideOnly: true },
  { label: "Brought", isWideOnly: true },
] as const;

const sumOf = (rows: Extract["rows"]): string =>
  rows ? `${count(rows.read)} = ${[rows.accepted, rows.refused, rows.skipped].map(count).join(" + ")}` : "–";

const stateTone = ({ state, failure }: Extract): "calm" | "warning" | "plain" => {
  if (failure) return "warning";
  return state === "committed" ? "calm" : "plain";
};

const stateWords = (extract: Extract): string =>
  extract.state === "receiving" && extract.receivedBytes > 0
    ? `${shareOf(extract)} of the file is here`
    : STATE_WORDS[extract.state];

const Row = ({ programmeId, extract }: { programmeId: string; extract: Extract }) => (
  <tr>
    <td className="text-right font-mono text-[13px]">{extract.number}</td>
    <td className="min-w-44 wrap-anywhere">
      <Link
        to={paths.programme.to(programmeId, "extracts", `/${extract.id}`)}
        className="inline-block min-h-6 font-medium underline decoration-edge underline-offset-4 hover:decoration-ink"
      >
        {extract.name}
      </Link>
      <span className="block text-xs text-soft">{extract.fileName}</span>
      {extract.rows ? (
        <span className="block text-xs text-soft sm:hidden">
          {sumOf(extract.rows)} rows: read = accepted + refused + skipped
        </span>
      ) : null}
    </td>
    <td>
      <Pill tone={stateTone(extract)}>{stateWords(extract)}</Pill>
      {extract.failure ? (
        <span className="mt-1 block max-w-56 text-xs text-mark">◆ {extract.failure.message}</span>
      ) : null}
    </td>
    <td className="text-right font-mono text-[13px] whitespace-nowrap max-sm:hidden">
      {sumOf(extract.rows)}
    </td>
    <td className="text-right font-mono text-[13px] max-sm:hidden">
      {extract.newStars === null ? "–" : count(extract.newStars)}
    </td>
    <td className="text-right font-mono text-[13px] max-sm:hidden">{extract.edition ?? "–"}</td>
    <td className="max-sm:hidden">
      <Moment at={extract.createdAt} isShort />
      <span className="block text-xs text-soft">by {extract.uploadedBy.name}</span>
    </td>
  </tr>
);

const Empty = ({ canEdit, onRead }: { canEdit: boolean; onRead: () => void }) => (
  <EmptyState
    title="No stars yet"
    actions={
      canEdit ? (
        <Button kind="main" onClick={onRead}>
          Read file
        </Button>
      ) : undefined
    }
  >
    {canEdit
      ? "Bring a catalogue file, or paste a few rows. You confirm how its columns are read before anything is stored."
      : "Nobody has brought a catalogue file. A curator of this programme can."}
  </EmptyState>
);

/** The tables of stars that were brought into the programme, and what became of their rows. */
export const ExtractsPage = () => {
  const programmeId = useProgrammeId();
  const canEdit = useCan()("extract.edit");
  const [isReading, setReading] = useState(false);
  const { data: extracts } = useSuspenseQuery(extractsOptions(programmeId));
  const read = () => setReading(true);
  return (
    <Page
      title="Extracts"
      lede="Catalogue files as they were brought. Each is kept untouched; each commit makes a catalogue edition."
      actions={
        canEdit && extracts.length > 0 ? (
          <Button kind="main" onClick={read}>
            Read file
          </Button>
        ) : undefined
      }
    >
      {extracts.length === 0 ? (
        <Empty canEdit={canEdit} onRead={read} />
      ) : (
        <LedgerTable caption="Extracts" heads={HEADS}>
          {extracts.map((extract) => (
            <Row key={extract.id} programmeId={programmeId} extract={extract} />
          ))}
        </LedgerTable>
      )}
      <ReadFileDialog isOpen={isReading} onClose={() => setReading(false)} />
    </Page>
  );
};
