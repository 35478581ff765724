import { useQuery } from "@tanstack/react-query";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { findOptions } from "#src/api/stars.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

interface Props {
  programmeId: string;
  view: ViewSpec;
  text: string;
  /** `place` from 1; null where a cut drops the star. */
  onOpen: (starId: string, place: number | null) => void;
  onClose: () => void;
}

/** Stars whose name or identifier begins as asked; those that a cut drops are said to be out of this result. */
export const FindResult = ({ programmeId, view, text, onOpen, onClose }: Props) => {
  const { data: matches, error, isPending } = useQuery(findOptions(programmeId, view, text));
  return (
    <section aria-label="Stars found" className="border-b border-rule bg-sheet px-5 py-3">
      <div className="flex items-start justify-between gap-4">
        <div className="min-w-0 grow">
          {error ? (
            <ErrorNotice error={error} />
          ) : isPending ? (
            <p className="text-soft">Looking for “{text}”…</p>
          ) : null}
          {matches?.length === 0 ? (
            <p>
              “{text}” is not in the catalogue under any name or identifier.{" "}
              <span className="text-soft">Check the spelling, or find it by another of its names.</span>
            </p>
          ) : null}
          {matches && matches.length > 0 ? (
            <ul className="flex flex-wrap gap-x-6 gap-y-1">
              {matches.map((match) => (
                <li key={match.id}>
                  <button
                    type="button"
                    onClick={() => onOpen(match.id, match.place)}
                    className="font-mono underline decoration-edge underline-offset-4"
                  >
                    {match.designation}
                  </button>{" "}
                  <span className="text-xs text-soft">
                    {match.place === null
                      ? "not in this result: open it to see why"
                      : `place ${count(match.place)}`}
                  </span>
                </li>
              ))}
            </ul>
          ) : null}
        </div>
        <button
          type="button"
          onClick={onClose}
          aria-label="Close what was found"
          className="size-6 flex-none text-lg leading-none text-soft"
        >
          ×
        </button>
      </div>
    </section>
  );
};
