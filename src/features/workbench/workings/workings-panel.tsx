import { useQuery } from "@tanstack/react-query";
import { useEffect, useRef } from "react";
import type { StarSheet } from "#shared/api/stars.ts";
import type { Working, Workings } from "#shared/api/workings.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { workingsText } from "#shared/format/workings-text.ts";
import { workingsOptions } from "#src/api/workings.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";
import { CopyText } from "./copy-text.tsx";
import { Draws, useDraws } from "./draws.tsx";
import { quantityText } from "./figures.ts";
import { MathSymbol } from "./formula.tsx";
import { StepView } from "./step-view.tsx";
import { hasSymbol, stepsUnder } from "./steps.ts";

interface Props {
  programmeId: string;
  view: ViewSpec;
  star: StarSheet;
  /** The quantity first, then the steps followed down from it. */
  trail: readonly string[];
  onTrail: (trail: readonly string[]) => void;
  /** Back to the star. */
  onClose: () => void;
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
/** As the table and the copied text call it. */
const titleOf = ({ label }: Working): string => capital(label);

/** Leads the keyboard: down to the heading of what opens, back to the link it was opened by. */
const useTrailFocus = (trail: readonly string[], isReady: boolean) => {
  const panel = useRef<HTMLElement>(null);
  const before = useRef<readonly string[]>([]);
  const path = trail.join();
  // biome-ignore lint/correctness/useExhaustiveDependencies: the path says all of the trail
  useEffect(() => {
    if (!isReady) return;
    const left = before.current[trail.length];
    before.current = trail;
    const link =
      left === undefined ? null : panel.current?.querySelector<HTMLElement>(`[data-workings="${left}"]`);
    (link ?? panel.current?.querySelector<HTMLElement>("h2"))?.focus();
  }, [path, isReady]);
  return panel;
};

/** Steps that lie below, each with its value; they open in place. */
const Below = ({ steps, onOpen }: { steps: readonly Working[]; onOpen: (key: string) => void }) => (
  <ul className="text-[13px]">
    {steps.map((step) => (
      <li key={step.key}>
        <button
          type="button"
          onClick={() => onOpen(step.key)}
          className="flex min-h-7 w-full items-center justify-between gap-3 text-left hover:bg-sel"
        >
          <span className="underline decoration-edge underline-offset-4">
            {titleOf(step)} <span className="sr-only">, its workings: </span>
            {hasSymbol(step) ? (
              <span aria-hidden="true" className="font-mono text-xs text-soft">
                <MathSymbol name={step.symbol} />
              </span>
            ) : null}
          </span>
          <span className="font-mono text-[12.5px]">
            {step.value === null
              ? (step.blank?.word ?? "blank")
              : quantityText(step.key, step.unit, step.value, step.error)}
          </span>
        </button>
      </li>
    ))}
  </ul>
);

const Foot = ({ recipe, card, campaign }: Workings) => (
  <dl className="mt-5 grid grid-cols-[auto_1fr] gap-x-3 gap-y-0.5 border-t border-hair pt-3 text-xs">
    {(
      [
        ["Recipe", recipe],
        ["Card", card],
        ["Campaign", campaign],
      ] as const
    ).map(([word, name]) =>
      name === null ? null : (
        <div key={word} className="contents">
          <dt className="text-soft">{word}</dt>
          <dd>{name}</dd>
        </div>
      ),
    )}
  </dl>
);

const Opened = ({ workings, ...props }: Props & { workings: Workings }) => {
  const { programmeId, view, star, trail, onTrail, onClose } = props;
  const { steps } = workings;
  const last = trail.at(-1);
  // An address may name a step that this star's chain does not have: then the quantity itself is shown.
  const isOnTrail = steps.some(({ key }) => key === last);
  const path = isOnTrail ? trail : trail.slice(0, 1);
  const under = stepsUnder(steps, path.at(-1) ?? "");
  const [shown, ...below] = under;
  const draws = useDraws({ programmeId, view, starId: star.id, key: trail[0] ?? "" });
  const panel = useTrailFocus(path, true);
  if (!shown) return <p className="p-5 text-soft">This quantity has no workings.</p>;
  const parent = steps.find(({ key }) => key === path.at(-2));
  const description = findColumn(shown.key)?.description;
  const onOpen = (key: string) => onTrail([...path, key]);
  const text = workingsText({ ...workings, steps: under, drawn: draws.drawn });
  return (
    <article ref={panel} aria-label={`Workings of ${titleOf(shown)}, ${star.designation}`} className="p-5">
      <div className="mb-2 flex items-center justify-between gap-3">
        <Button
          kind="plain"
          className="px-0!"
          onClick={() => (parent ? onTrail(path.slice(0, -1)) : onClose())}
        >
          <span aria-hidden="true">←</span>
          <span className="sr-only">Back to</span> {parent ? titleOf(parent) : star.designation}
        </Button>
        {parent ? (
          <Button kind="plain" className="px-0!" onClick={onClose}>
            {star.designation}
          </Button>
        ) : null}
      </div>
      <p className="text-xs text-soft">Workings</p>
      <h2 tabIndex={-1} className="-mx-1.5 w-fit rounded px-1.5 text-[22px] outline-offset-0">
        {titleOf(shown)}
      </h2>
      {description ? <p className="text-[13px] text-soft">{description}.</p> : null}
      <StepView working={shown} steps={steps} entries={star.entries} onOpen={onOpen} />
      {below.length === 0 ? null : (
        <>
          <SectionTitle>Rests on</SectionTitle>
          <Below steps={below} onOpen={onOpen} />
        </>
      )}
      <SectionTitle>By draws</SectionTitle>
      <Draws working={shown} draws={draws} />
      <div className="mt-5">
        <CopyText text={text} />
      </div>
      <Foot {...workings} />
    </article>
  );
};

/** How one number of the star came about, step by step down to what was given. */
export const WorkingsPanel = (props: Props) => {
  const { programmeId, view, star, trail, onClose } = props;
  const key = trail[0] ?? "";
  const { data, error, refetch } = useQuery(
    workingsOptions(programmeId, view, { starId: star.id, key, drawn: null }),
  );
  if (data) return <Opened key={`${star.id} ${key}`} {...props} workings={data} />;
  if (!error) return <Loading what="Reading the workings" />;
  return (
    <div className="p-5">
      <ErrorNotice error={error} onRetry={() => void refetch()} />
      <Button className="mt-3" onClick={onClose}>
        Back to {star.designation}
      </Button>
    </div>
  );
};
