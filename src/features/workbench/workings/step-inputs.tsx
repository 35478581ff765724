import type { StarSheet } from "#shared/api/stars.ts";
import type { Working, WorkingInput } from "#shared/api/workings.ts";
import { count } from "#shared/format/numbers.ts";
import { inputText, quantityText } from "./figures.ts";
import { MathSymbol } from "./formula.tsx";
import { givenBy } from "./steps.ts";

const ORIGINS: Readonly<Record<WorkingInput["origin"], string>> = {
  given: "as given",
  assumed: "assumed by the recipe",
  recipe: "set by the recipe",
  instrument: "of the card or campaign",
  derived: "worked out",
};

const originText = (input: WorkingInput, entries: StarSheet["entries"]): string => {
  const rows = input.origin === "given" ? givenBy(input, entries) : [];
  if (rows.length === 0) return ORIGINS[input.origin];
  return `given by ${rows.map((row) => `extract ${row.extractNumber}, ${row.extractName}, row ${count(row.rowNumber)}`).join("; ")}`;
};

const valueText = ({ value, error, unit, step }: WorkingInput, steps: readonly Working[]): string => {
  if (value === null) return "blank";
  if (step === null) return inputText(unit, value, error);
  const own = steps.find(({ key }) => key === step);
  return quantityText(step, unit, value, error ?? own?.error ?? null);
};

interface Props {
  inputs: Working["inputs"];
  steps: readonly Working[];
  entries: StarSheet["entries"];
  onOpen: (key: string) => void;
}

/** What enters the formula and where each of it comes from; what is worked out itself opens. */
export const StepInputs = ({ inputs, steps, entries, onOpen }: Props) => (
  <ul className="text-[13px]">
    {inputs.map((input) => {
      const { symbol, name, step, value } = input;
      return (
        <li key={symbol} className="border-t border-hair py-1.5 first:border-t-0 first:pt-0">
          <p className="flex justify-between gap-3 font-mono text-[12.5px]">
            <span className="text-blue" title={symbol}>
              <MathSymbol name={symbol} />
            </span>
            <span className="text-right" title={value === null ? undefined : String(value)}>
              {valueText(input, steps)}
            </span>
          </p>
          <p className="text-xs text-soft">
            {name}:{" "}
            {step === null ? (
              originText(input, entries)
            ) : (
              <button
                type="button"
                data-workings={step}
                onClick={() => onOpen(step)}
                className="inline-flex min-h-6 items-center text-ink underline decoration-edge underline-offset-4 hover:decoration-ink"
              >
                worked out<span className="sr-only">, workings of the {name}</span>
                <span aria-hidden="true">&nbsp;→</span>
              </button>
            )}
          </p>
        </li>
      );
    })}
  </ul>
);
