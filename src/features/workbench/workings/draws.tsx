import { useQuery } from "@tanstack/react-query";
import { type FormEvent, useId, useState } from "react";
import type { Working, Workings } from "#shared/api/workings.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { workingsOptions } from "#src/api/workings.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { boundsText } from "./figures.ts";

export const DRAWS = 1000;
const LARGEST_SEED = 2 ** 31 - 1;

export interface Asked {
  programmeId: string;
  view: ViewSpec;
  starId: string;
  /** The quantity whose workings are read; its steps are drawn along. */
  key: string;
}

/** Draws once they are asked for; asked again with another seed, they are others. */
export const useDraws = ({ programmeId, view, starId, key }: Asked) => {
  const [seed, setSeed] = useState<number | null>(null);
  const query = useQuery({
    ...workingsOptions(programmeId, view, {
      starId,
      key,
      drawn: { draws: DRAWS, seed: seed ?? 1 },
    }),
    enabled: seed !== null,
  });
  return { query, draw: setSeed, drawn: seed === null ? null : (query.data?.drawn ?? null) };
};

const whyNone = ({ value, errorParts, error }: Working, isTooBlank: boolean): string => {
  if (value === null) return "The value is blank, so there is nothing to draw.";
  if (isTooBlank)
    return "More than 16 % of the draws fall outside the range of a relation; an interval of the rest would mislead.";
  const without = errorParts.filter(({ size }) => size === null).map(({ source }) => source);
  if (without.length > 0) return `No interval: no error is given for ${without.join(", ")}.`;
  return error === null
    ? "No interval: an input has no error, and none is made up."
    : "No interval for this quantity.";
};

const Intervals = ({ working, drawn }: { working: Working; drawn: NonNullable<Workings["drawn"]> }) => {
  const { key, unit, value, error } = working;
  const interval = drawn.intervals[key];
  if (!interval) return <p className="text-[13px]">{whyNone(working, interval === null)}</p>;
  const { p16, p50, p84, blankShare } = interval;
  const [low, middle, high] = boundsText(key, unit, [p16, p50, p84], (p84 - p16) / 2);
  const firstOrder =
    value === null || error === null
      ? null
      : boundsText(key, unit, [value - error, value, value + error], error);
  return (
    <>
      <table className="w-full text-[13px] [&_td]:py-0.5 [&_td]:text-right [&_td]:font-mono [&_td]:text-[12.5px] [&_th]:font-normal [&_th]:text-soft">
        <caption className="sr-only">Interval by draws beside that of first order</caption>
        <thead>
          <tr>
            <td />
            <th scope="col" className="text-right">
              draws
            </th>
            <th scope="col" className="text-right">
              first order
            </th>
          </tr>
        </thead>
        <tbody>
          {(
            [
              ["16 %", low, firstOrder?.[0]],
              ["50 %", middle, firstOrder?.[1]],
              ["84 %", high, firstOrder?.[2]],
            ] as const
          ).map(([level, byDraws, byFirstOrder]) => (
            <tr key={level}>
              <th scope="row" className="text-left">
                {level}
              </th>
              <td>{byDraws}</td>
              <td className="text-soft">{byFirstOrder ?? "no error"}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {blankShare > 0 ? (
        <p className="mt-1 text-xs text-soft">
          {(100 * blankShare).toFixed(1)} % of the draws fell outside the range of a relation and are left
          out.
        </p>
      ) : null}
    </>
  );
};

interface Props {
  working: Working;
  draws: ReturnType<typeof useDraws>;
}

/** On demand: the interval of a thousand draws of everything that has an error, beside the error of first order. */
export const Draws = ({ working, draws: { query, draw, drawn } }: Props) => {
  const id = useId();
  const [text, setText] = useState("1");
  const [problem, setProblem] = useState("");
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const seed = Number(text.trim());
    if (!Number.isInteger(seed) || seed < 1 || seed > LARGEST_SEED) {
      setProblem("A seed is a whole number from 1 to 2 147 483 647.");
      return;
    }
    setProblem("");
    draw(seed);
  };
  return (
    <>
      <form noValidate onSubmit={submit} className="mb-2 flex flex-wrap items-center gap-2 text-[13px]">
        <label htmlFor={id} className="text-soft">
          Seed
        </label>
        <input
          id={id}
          value={text}
          inputMode="numeric"
          aria-invalid={problem ? true : undefined}
          aria-describedby={`${id}-words`}
          onChange={(event) => setText(event.target.value)}
          className="min-h-8 w-28 rounded border border-edge bg-sheet px-2.5 py-1 text-right font-mono text-ink aria-invalid:border-mark"
        />
        <Button type="submit" isBusy={query.isFetching}>
          Draw {count(DRAWS)} times
        </Button>
      </form>
      <p id={`${id}-words`} className={`mb-2 text-xs ${problem ? "text-mark" : "text-soft"}`}>
        {problem ? `◆ ${problem}` : "The same seed gives the same draws."}
      </p>
      {query.error ? <ErrorNotice error={query.error} /> : null}
      <div role="status">
        {drawn ? (
          <>
            <p className="text-xs text-soft">
              {count(drawn.draws)} draws, seed <span className="font-mono">{drawn.seed}</span>
            </p>
            <Intervals working={working} drawn={drawn} />
          </>
        ) : null}
      </div>
    </>
  );
};
