import type { KeyboardEvent } from "react";
import { Field } from "#src/ui/field.tsx";
import { readFigure } from "./term-draft.ts";

const STEP = 0.5;
const MOST = 100;

interface Props {
  name: string;
  weight: string;
  error: string | undefined;
  disabled: boolean;
  onChange: (weight: string) => void;
}

const KEYS: Readonly<Record<string, number>> = { ArrowUp: STEP, ArrowDown: -STEP, PageUp: 5, PageDown: -5 };

/** A weight: typed, or moved by half a unit with the arrow keys or the buttons. */
export const WeightInput = ({ name, weight, error, disabled, onChange }: Props) => {
  const now = readFigure(weight);
  const move = (by: number) => {
    if (!disabled && typeof now === "number") onChange(String(Math.max(0, Math.min(MOST, now + by))));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const by = KEYS[event.key];
    if (by === undefined) return;
    move(by);
    event.preventDefault();
  };
  const button = (by: number, sign: string, label: string) => (
    <button
      type="button"
      aria-label={label}
      disabled={disabled}
      onClick={() => move(by)}
      className="size-8 flex-none rounded border border-edge bg-sheet font-mono hover:bg-sel disabled:opacity-60"
    >
      {sign}
    </button>
  );
  return (
    <Field label="Weight" error={error}>
      {(ids) => (
        <>
          {button(-STEP, "−", `Weight less by ${STEP}`)}
          <input
            {...ids}
            name={name}
            role="spinbutton"
            inputMode="decimal"
            autoComplete="off"
            aria-valuenow={typeof now === "number" ? now : undefined}
            aria-valuemin={0}
            aria-valuemax={MOST}
            disabled={disabled}
            value={weight}
            onChange={(event) => onChange(event.target.value)}
            onKeyDown={onKeyDown}
            className="min-h-8 w-16 rounded border border-edge bg-sheet px-2 py-1 text-right font-mono text-ink aria-invalid:border-mark"
          />
          {button(STEP, "+", `Weight more by ${STEP}`)}
        </>
      )}
    </Field>
  );
};
