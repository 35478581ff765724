import { useQuery } from "@tanstack/react-query";
import { useEffect, useRef } from "react";
import type { StarSheet as Sheet } from "#shared/api/stars.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { type Column, errorKey } from "#shared/catalogue/columns.ts";
import { flagsIn } from "#shared/catalogue/flags.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { cellText, count, fixed } from "#shared/format/numbers.ts";
import { declinationText, rightAscensionText } from "#shared/format/sexagesimal.ts";
import { sheetOptions } from "#src/api/stars.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Pill } from "#src/ui/pill.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";
import { ReachPicture } from "./reach-picture.tsx";
import { StarOrigins } from "./star-origins.tsx";
import { toldColumns } from "./told.ts";
import { TransitPicture } from "./transit-picture.tsx";
import { WorkingsPanel } from "./workings/workings-panel.tsx";

const unitOf = (column: Column): string => (column.unitLabel === "–" ? "" : ` ${column.unitLabel}`);

interface QuantityProps {
  column: Column;
  words: string;
  star: Sheet;
  onOpen: (key: string) => void;
}

/** A value, or the word of its blank: it opens its workings. */
const Quantity = ({ column, words, star, onOpen }: QuantityProps) => {
  const value = star.values[column.key];
  const reason = value === undefined ? blankReason(star.blanks[column.key] ?? 1) : null;
  if (reason && star.blanks[column.key] === undefined && column.stage === "instrument") return null;
  return (
    <>
      <dt className="self-center text-soft" title={column.description}>
        {words}
      </dt>
      <dd className="text-right font-mono">
        <button
          type="button"
          data-workings={column.key}
          onClick={() => onOpen(column.key)}
          className={`min-h-6 underline decoration-hair underline-offset-4 hover:decoration-ink ${reason ? "text-faint" : ""}`}
        >
          {value === undefined
            ? reason?.word
            : `${cellText(column, value, star.values[errorKey(column.key)])}${unitOf(column)}`}
          <span className="sr-only">, workings of: {words}</span>
        </button>
      </dd>
      {reason ? <dd className="col-span-2 -mt-0.5 mb-1 text-xs text-soft">{reason.sentence}</dd> : null}
    </>
  );
};

const Flags = ({ star }: { star: Sheet }) => {
  const flags = flagsIn(star.flagBits);
  return (
    <p className="mt-1.5 mb-3 flex flex-wrap gap-1">
      {flags.length === 0 ? <Pill tone="calm">no flags</Pill> : null}
      {flags.map((flag) => (
        <Pill key={flag.key} tone={flag.isWarning ? "warning" : "plain"} title={flag.sentence}>
          {flag.word}
          {flag.key === "shared-light" && star.values.light_share !== undefined
            ? ` ${fixed(star.values.light_share, 3)}`
            : ""}
        </Pill>
      ))}
    </p>
  );
};

const Position = ({ star }: { star: Sheet }) => {
  const { ra, dec, epoch } = star.values;
  if (ra === undefined || dec === undefined)
    return <p className="text-xs text-soft">No position is given.</p>;
  return (
    <p className="font-mono text-[12.5px]">
      {rightAscensionText(ra)} {declinationText(dec)}
      <span className="text-soft">
        {epoch === undefined ? " (no epoch given)" : ` (ICRS, J${epoch.toFixed(1)})`}
      </span>
    </p>
  );
};

const Dropped = ({ star, view }: { star: Sheet; view: ViewSpec }) =>
  star.droppedBy.length === 0 ? null : (
    <div className="mb-3 rounded border border-mark p-2.5 text-[13px]">
      <p className="font-medium">Not in this result.</p>
      <ul className="mt-1 text-soft">
        {star.droppedBy.map((i) => (
          <li key={i}>
            Cut {i + 1} drops it: <span className="font-mono text-blue">{view.cuts[i]?.expression}</span>
          </li>
        ))}
      </ul>
    </div>
  );

interface ToldProps {
  star: Sheet;
  view: ViewSpec;
  columns: readonly string[];
  takeCameFrom: () => string | null;
  onOpen: (key: string) => void;
  onClose: () => void;
}

const Told = ({ star, view, columns, takeCameFrom, onOpen, onClose }: ToldProps) => {
  const place = useRef<HTMLElement>(null);
  useEffect(() => {
    const key = takeCameFrom();
    if (key !== null) place.current?.querySelector<HTMLElement>(`[data-workings="${key}"]`)?.focus();
  }, [takeCameFrom]);
  return (
    <article ref={place} aria-label={`Star ${star.designation}`} className="p-5">
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="font-mono! text-[19px]">{star.designation}</h2>
        <span className="text-xs whitespace-nowrap text-soft">
          {star.place === null ? "no place" : `place ${count(star.place)} of ${count(star.count)}`}
        </span>
        <button
          type="button"
          aria-label="Close the star"
          onClick={onClose}
          className="size-6 flex-none rounded text-lg leading-none text-soft hover:text-ink"
        >
          ×
        </button>
      </div>
      <Flags star={star} />
      <Dropped star={star} view={view} />
      <Position star={star} />
      <dl className="mt-3 grid grid-cols-[1fr_auto] gap-x-3 text-[13px]">
        {toldColumns(columns).map(({ column, words }) => (
          <Quantity key={column.key} column={column} words={words} star={star} onOpen={onOpen} />
        ))}
      </dl>
      <SectionTitle>A transit as this instrument would see it</SectionTitle>
      <TransitPicture star={star} />
      <SectionTitle>Smallest planet found, by period</SectionTitle>
      <ReachPicture star={star} />
      <StarOrigins star={star} />
      <p className="mt-5 border-t border-hair pt-3 text-xs text-soft">
        Chance of transit is geometric; it says nothing about whether planets exist. Habitable zone is a model
        range of received light, not a promise. Radius recipe: about 3 % scatter, dwarfs only. RUWE near 1
        does not prove a single star.
      </p>
    </article>
  );
};

interface Props {
  programmeId: string;
  view: ViewSpec;
  starId: string;
  /** Columns of the table: what is worked out of them is told too. */
  columns: readonly string[];
  /** The quantity whose workings are open, then the steps followed down; empty where none are. */
  workings: readonly string[];
  /** The quantity whose workings were just closed, once: the keyboard goes on from there. */
  takeCameFrom: () => string | null;
  onWorkings: (trail: readonly string[]) => void;
  onCloseWorkings: () => void;
  onClose: () => void;
}

/** Everything on one star: what is known, how well, what the instrument would see, and where each value comes from. */
export const StarSheet = (props: Props) => {
  const { programmeId, view, starId, workings, onClose } = props;
  const { data: star, error, isPending, refetch } = useQuery(sheetOptions(programmeId, view, starId));
  const place = useRef<HTMLDivElement>(null);
  // Where the sheet lies under the table, opening a star leads to it.
  // biome-ignore lint/correctness/useExhaustiveDependencies: another star leads there again
  useEffect(() => {
    if (!window.matchMedia("(min-width: 64rem)").matches) place.current?.scrollIntoView({ block: "start" });
  }, [starId]);
  return (
    <div ref={place}>
      {isPending ? <Loading what="Reading the star" /> : null}
      {error ? (
        <div className="p-5">
          <ErrorNotice error={error} onRetry={() => void refetch()} />
          <Button className="mt-3" onClick={onClose}>
            Close
          </Button>
        </div>
      ) : null}
      {star && workings.length > 0 ? (
        <WorkingsPanel
          programmeId={programmeId}
          view={view}
          star={star}
          trail={workings}
          onTrail={props.onWorkings}
          onClose={props.onCloseWorkings}
        />
      ) : null}
      {star && workings.length === 0 ? (
        <Told
          star={star}
          view={view}
          columns={props.columns}
          takeCameFrom={props.takeCameFrom}
          onOpen={(key) => props.onWorkings([key])}
          onClose={onClose}
        />
      ) : null}
    </div>
  );
};
