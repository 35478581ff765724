import type { ViewSummary } from "#shared/api/stars.ts";
import { count } from "#shared/format/numbers.ts";
import { Button } from "#src/ui/button.tsx";
import { announce } from "#src/ui/live-region.tsx";

interface Props {
  summary: ViewSummary;
  range: { first: number; last: number };
  sortWords: string;
  isPlain: boolean;
  onPlain: () => void;
  /** px. */
  rowHeight: string;
  onRowHeight: () => void;
  isSexagesimal: boolean;
  onPositions: () => void;
}

const copyLink = async (): Promise<void> => {
  try {
    await navigator.clipboard.writeText(window.location.href);
    announce("The link to this view is copied");
  } catch {
    announce("The link could not be copied: copy it from the address bar");
  }
};

/** What is in view, in which order, which set of stars it is, and the switches of the table. */
export const TableFooter = ({
  summary,
  range,
  sortWords,
  isPlain,
  onPlain,
  rowHeight,
  onRowHeight,
  isSexagesimal,
  onPositions,
}: Props) => (
  <footer className="flex min-h-[38px] flex-wrap items-center gap-x-4 gap-y-1 border-t border-rule px-5 py-1 text-[12.5px] text-soft">
    {summary.count > 0 && !isPlain ? (
      <span className="font-mono">
        rows {count(range.first + 1)}–{count(Math.min(range.last + 1, summary.count))} of{" "}
        {count(summary.count)}
      </span>
    ) : null}
    <span>{sortWords}</span>
    <span className="grow" />
    <span title="The same set of stars has the same fingerprint on any machine">
      set <span className="font-mono">{summary.fingerprint}</span>
    </span>
    <Button kind="plain" className="px-0!" onClick={onPositions} aria-keyshortcuts="d">
      {isSexagesimal ? "positions in h m s" : "positions in degrees"}
    </Button>
    {isPlain ? null : (
      <Button
        kind="plain"
        className="px-0!"
        onClick={onRowHeight}
        aria-label={`Rows ${rowHeight} px high; change`}
      >
        rows {rowHeight} px
      </Button>
    )}
    <Button kind="plain" className="px-0!" onClick={onPlain}>
      {isPlain ? "As a grid" : "Plain pages"}
    </Button>
    <Button kind="plain" className="px-0!" onClick={() => void copyLink()}>
      Copy link
    </Button>
  </footer>
);
