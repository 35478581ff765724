import { useEffect, useId, useRef } from "react";
import { Button } from "#src/ui/button.tsx";
import { announce } from "#src/ui/live-region.tsx";
import type { Option } from "./recipe-settings.ts";

interface Props {
  label: string;
  name: string;
  hint?: string | undefined;
  source?: string | undefined;
  error?: string | undefined;
  options: readonly Option[];
  chosen: readonly string[];
  onChange: (chosen: readonly string[]) => void;
}

type Way = "up" | "down";

/** The list with one of its parts a place further up or down. */
export const moved = (chosen: readonly string[], value: string, way: Way): readonly string[] => {
  const from = chosen.indexOf(value);
  const to = from + (way === "up" ? -1 : 1);
  const other = chosen[to];
  if (from < 0 || other === undefined) return chosen;
  return chosen.map((each, i) => (i === from ? other : i === to ? value : each));
};

/** Buttons keep the focus while their row moves; at an end the opposite one takes it. */
const useFocusAfterMove = (chosen: readonly string[]) => {
  const list = useRef<HTMLOListElement>(null);
  const last = useRef<{ value: string; way: Way } | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: the new order is what is waited for
  useEffect(() => {
    if (!last.current) return;
    const { value, way } = last.current;
    last.current = null;
    const buttons = [...(list.current?.querySelectorAll<HTMLButtonElement>("button[data-way]") ?? [])].filter(
      (button) => button.dataset.value === value && !button.disabled,
    );
    (buttons.find((button) => button.dataset.way === way) ?? buttons[0])?.focus();
  }, [chosen]);
  return { list, last };
};

/** An order of preference: every part can be moved, left out and taken in again. */
export const RecipeOrder = ({ label, name, hint, source, error, options, chosen, onChange }: Props) => {
  const id = useId();
  const { list, last } = useFocusAfterMove(chosen);
  const labelOf = (value: string): string => options.find((each) => each.value === value)?.label ?? value;
  const left = options.filter(({ value }) => !chosen.includes(value));
  const move = (value: string, way: Way) => {
    const next = moved(chosen, value, way);
    last.current = { value, way };
    onChange(next);
    announce(`${labelOf(value)} is number ${next.indexOf(value) + 1} of ${next.length}.`);
  };
  const words = [hint, source].filter(Boolean).join(" ");
  return (
    <fieldset
      name={name}
      tabIndex={-1}
      aria-describedby={[words ? `${id}-hint` : "", error ? `${id}-error` : ""].filter(Boolean).join(" ")}
    >
      <legend className="font-medium">{label}</legend>
      <ol ref={list} className="mt-1 max-w-xl rounded border border-edge bg-sheet">
        {chosen.map((value, i) => (
          <li
            key={value}
            className="flex flex-wrap items-center justify-between gap-x-3 gap-y-1 border-t border-hair px-2.5 py-1 first:border-t-0"
          >
            <span className="min-w-0">
              <span className="mr-2 font-mono text-xs text-soft">{i + 1}</span>
              {labelOf(value)}
            </span>
            <span className="flex gap-1">
              {(["up", "down"] as const).map((way) => (
                <Button
                  key={way}
                  data-way={way}
                  data-value={value}
                  aria-label={`Move ${labelOf(value)} ${way}`}
                  className="w-8 px-0"
                  disabled={i === (way === "up" ? 0 : chosen.length - 1)}
                  onClick={() => move(value, way)}
                >
                  <span aria-hidden="true">{way === "up" ? "↑" : "↓"}</span>
                </Button>
              ))}
              <Button
                aria-label={`Leave out ${labelOf(value)}`}
                onClick={() => onChange(chosen.filter((each) => each !== value))}
              >
                Leave out
              </Button>
            </span>
          </li>
        ))}
        {chosen.length === 0 ? <li className="px-2.5 py-1 text-soft">nothing yet</li> : null}
      </ol>
      {left.length > 0 ? (
        <div className="mt-1.5 flex flex-wrap items-center gap-1.5">
          <span className="text-xs text-soft">left out:</span>
          {left.map(({ value, label: text }) => (
            <Button key={value} aria-label={`Take in ${text}`} onClick={() => onChange([...chosen, value])}>
              + {text}
            </Button>
          ))}
        </div>
      ) : null}
      {words ? (
        <p id={`${id}-hint`} className="mt-1 text-xs text-soft">
          {words}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="mt-1 text-xs text-mark">
          <span aria-hidden="true">◆ </span>
          {error}
        </p>
      ) : null}
    </fieldset>
  );
};
