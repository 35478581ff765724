import type { ReactNode } from "react";

interface Props<V extends string> {
  legend: string;
  choices: readonly { value: V; label: ReactNode }[];
  value: V;
  onValue: (value: V) => void;
}

/** One of a few, side by side. */
export const Choice = <V extends string>({ legend, choices, value, onValue }: Props<V>) => (
  <fieldset className="inline-flex flex-wrap rounded border border-edge">
    <legend className="sr-only">{legend}</legend>
    {choices.map((choice) => (
      <button
        key={choice.value}
        type="button"
        aria-pressed={value === choice.value}
        onClick={() => onValue(choice.value)}
        className={`min-h-7 px-2.5 text-[13px] [&:nth-child(2)]:rounded-l last:rounded-r ${value === choice.value ? "bg-ink text-paper" : "bg-sheet"}`}
      >
        {choice.label}
      </button>
    ))}
  </fieldset>
);
