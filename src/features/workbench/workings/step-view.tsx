import type { StarSheet } from "#shared/api/stars.ts";
import type { Working } from "#shared/api/workings.ts";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";
import { ErrorParts } from "./error-parts.tsx";
import { everyDigit, figure, inputText, quantityText, unitText } from "./figures.ts";
import { Formula, MathSymbol } from "./formula.tsx";
import { StepInputs } from "./step-inputs.tsx";
import { hasSymbol } from "./steps.ts";

const Value = ({ working }: { working: Working }) => {
  const { key, unit, value, error, blank, ranges } = working;
  if (value !== null)
    return (
      <>
        <p className="mt-1 font-mono text-[19px]">{quantityText(key, unit, value, error)}</p>
        <p className="font-mono text-[11px] text-soft">
          {everyDigit(value)} {unitText(unit)}
        </p>
      </>
    );
  const missed = ranges.filter(({ holds }) => !holds);
  return (
    <div className="mt-2 rounded border border-edge p-2.5 text-[13px]">
      <p className="font-medium">Blank: {blank?.word ?? "an input is missing"}</p>
      <p className="text-soft">
        {blank?.sentence ?? "One of the values below is blank, so nothing follows from it."}
      </p>
      {missed.map((range) => (
        <p key={range.symbol} className="mt-1 text-soft">
          <RangeText range={range} />
        </p>
      ))}
    </div>
  );
};

const RangeText = ({ range: { symbol, from, to, value } }: { range: Working["ranges"][number] }) => (
  <>
    holds for{" "}
    <span className="font-mono">
      <MathSymbol name={symbol} />
    </span>{" "}
    from <span className="font-mono">{figure(from)}</span> to <span className="font-mono">{figure(to)}</span>;{" "}
    {value === null ? (
      "here it is blank"
    ) : (
      <>
        here it is <span className="font-mono">{figure(value)}</span>
      </>
    )}
  </>
);

const Ranges = ({ ranges }: Pick<Working, "ranges">) => (
  <ul className="text-[13px]">
    {ranges.map((range) => (
      <li key={range.symbol} className="py-0.5">
        {range.holds ? (
          <span className="text-zone">
            <span aria-hidden="true">●</span> Inside
          </span>
        ) : (
          <span className="text-mark">
            <LevelMark level="stop" /> Outside
          </span>
        )}
        :{" "}
        <span className="text-soft">
          <RangeText range={range} />
        </span>
      </li>
    ))}
  </ul>
);

const FormulaLines = ({ working }: { working: Working }) => {
  const { symbol, label, unit, formula, substituted, isRoot, value } = working;
  const own = hasSymbol(working) ? <MathSymbol name={symbol} /> : label;
  return (
    <div className="rounded border border-hair bg-paper p-2.5 font-mono text-[12.5px] leading-relaxed wrap-anywhere">
      <p className="text-blue">
        {isRoot ? "0" : own} = <Formula text={formula} />
      </p>
      {value === null ? null : (
        <>
          <p className="mt-1.5">
            = <Formula text={substituted} isSum />
          </p>
          {isRoot ? (
            <p className="mt-1.5 font-sans text-xs text-soft">{own} is the value that makes this zero.</p>
          ) : (
            <p className="mt-1.5">= {inputText(unit, value, null)}</p>
          )}
        </>
      )}
    </div>
  );
};

interface Props {
  working: Working;
  /** Every step of the workings: those that enter this one have their errors there. */
  steps: readonly Working[];
  entries: StarSheet["entries"];
  onOpen: (key: string) => void;
}

/** One step: what came out, by which formula, from what, how far it holds and how sure it is. */
export const StepView = ({ working, steps, entries, onOpen }: Props) => (
  <>
    {working.method === "" ? null : <p className="text-[13px] text-soft">By: {working.method}</p>}
    <Value working={working} />
    {working.formula === "" ? null : (
      <>
        <SectionTitle>Formula</SectionTitle>
        <FormulaLines working={working} />
      </>
    )}
    {working.inputs.length === 0 ? null : (
      <>
        <SectionTitle>What enters it</SectionTitle>
        <StepInputs inputs={working.inputs} steps={steps} entries={entries} onOpen={onOpen} />
      </>
    )}
    {working.constants.length === 0 ? null : (
      <>
        <SectionTitle>Constants</SectionTitle>
        <ul className="text-[13px]">
          {working.constants.map(({ symbol, value, unit, source }) => (
            <li key={symbol} className="py-0.5">
              <p className="flex justify-between gap-3 font-mono text-[12.5px]">
                <span className="text-blue">
                  <MathSymbol name={symbol} />
                </span>
                <span title={String(value)}>{inputText(unit, value, null)}</span>
              </p>
              <p className="text-xs text-soft">{source}</p>
            </li>
          ))}
        </ul>
      </>
    )}
    {working.ranges.length === 0 ? null : (
      <>
        <SectionTitle>Where it holds</SectionTitle>
        <Ranges ranges={working.ranges} />
      </>
    )}
    {working.errorParts.length === 0 && working.scatter === "" ? null : (
      <>
        <SectionTitle>How sure it is</SectionTitle>
        {working.scatter === "" ? null : (
          <p className="mb-1 text-[13px] text-soft">
            Scatter of the relation: <span className="font-mono text-ink">{working.scatter}</span>
          </p>
        )}
        {working.errorParts.length === 0 ? null : <ErrorParts working={working} />}
      </>
    )}
    {working.reference === "" ? null : (
      <>
        <SectionTitle>Reference</SectionTitle>
        <p className="text-[13px]">{working.reference}</p>
      </>
    )}
  </>
);
