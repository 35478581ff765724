import type { TargetList } from "#shared/api/lists.ts";
import { byStateWords, STATE_LABELS } from "./list-words.ts";

const ORDER = ["draft", "in-review", "agreed", "issued"] as const;
const ENDED: readonly TargetList["state"][] = ["superseded", "withdrawn"];

const MEANS: Readonly<Record<(typeof ORDER)[number], string>> = {
  draft: "in the making",
  "in-review": "each star is looked at",
  agreed: "signed, values frozen",
  issued: "handed over",
};

const LOOKS = {
  done: "border-ink text-ink",
  now: "border-mark text-mark",
  ahead: "border-rule text-faint",
} as const;

/** The states a list goes through, and where it stands. */
export const StateLedger = ({ list }: { list: TargetList }) => {
  const at = (ORDER as readonly TargetList["state"][]).indexOf(list.state);
  const hasEnded = ENDED.includes(list.state);
  return (
    <ol aria-label="State of the list" className="flex flex-wrap gap-x-4 gap-y-3">
      {ORDER.map((state, i) => {
        const look = hasEnded || i < at ? "done" : i === at ? "now" : "ahead";
        return (
          <li
            key={state}
            aria-current={look === "now" ? "step" : undefined}
            className={`min-w-36 grow border-t-2 pt-1.5 sm:grow-0 ${LOOKS[look]}`}
          >
            {STATE_LABELS[state]}
            <span className="block text-xs text-soft">
              {look === "now" ? byStateWords(list) : MEANS[state]}
            </span>
          </li>
        );
      })}
      {hasEnded ? (
        <li aria-current="step" className={`min-w-36 border-t-2 pt-1.5 ${LOOKS.now}`}>
          {STATE_LABELS[list.state]}
        </li>
      ) : null}
    </ol>
  );
};
