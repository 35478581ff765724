import { useState } from "react";
import type { ColumnCard, ColumnSuggestion, ReadingPlan } from "#shared/api/extracts.ts";
import { findMeaning, KEPT, MEANINGS } from "#shared/catalogue/header-spellings.ts";
import { unitChoices } from "#shared/units/units.ts";
import { readText } from "./extract-words.ts";
import { meaningLabel } from "./plan-words.ts";

const BOX =
  "min-h-7 w-full rounded border border-edge bg-sheet px-1.5 text-[13px] text-ink disabled:border-transparent disabled:bg-transparent disabled:opacity-100";
/** Stands between blank marks: a comma may be part of one. */
const BETWEEN = ";";

/** The first text of the column, and the value that is read from it. */
const Sample = ({ suggestion }: { suggestion: ColumnSuggestion | undefined }) => {
  const samples = suggestion?.samples ?? [];
  const [first] = samples;
  if (!first) return <>–</>;
  const pair = ({ text, value }: typeof first): string =>
    value === null || String(value) === text ? text : `${text} → ${readText({ text, value })}`;
  return <span title={samples.map(pair).join("\n")}>{pair(first)}</span>;
};

/** A text that is taken over when the person leaves it or presses Enter. */
const LateText = (props: {
  label: string;
  value: string;
  isOff: boolean;
  placeholder?: string;
  list?: string;
  onValue: (value: string) => void;
}) => (
  <input
    key={props.value}
    aria-label={props.label}
    defaultValue={props.value}
    disabled={props.isOff}
    placeholder={props.placeholder}
    list={props.list}
    autoComplete="off"
    className={`${BOX} font-mono`}
    onBlur={(event) => {
      if (event.target.value.trim() !== props.value) props.onValue(event.target.value.trim());
    }}
    onKeyDown={(event) => {
      if (event.key === "Enter") event.currentTarget.blur();
    }}
  />
);

/**
 * What the column means. A wide file has thousands of these, so each holds all its choices only once a person comes
 * near it.
 */
const MeaningChoice = (props: {
  header: string;
  means: string;
  isOff: boolean;
  onMeans: (means: string) => void;
}) => {
  const [isNear, setNear] = useState(false);
  const comeNear = () => setNear(true);
  const choices = isNear ? [KEPT, ...MEANINGS.map((m) => m.key)] : [props.means];
  return (
    <select
      aria-label={`Meaning of ${props.header}`}
      value={props.means}
      disabled={props.isOff}
      className={`${BOX} ${props.means === KEPT ? "text-soft" : ""}`}
      onFocus={comeNear}
      onPointerEnter={comeNear}
      onPointerDown={comeNear}
      onChange={(event) => props.onMeans(event.target.value)}
    >
      {choices.map((key) => (
        <option key={key} value={key}>
          {meaningLabel(key)}
        </option>
      ))}
    </select>
  );
};

/** What stands in an empty unit field; the unit of RA may be answered as a question instead. */
const unitHint = (card: ColumnCard, canonical: string, raUnit: ReadingPlan["raUnit"]): string => {
  if (card.means === "ra" && raUnit !== null) return raUnit === "hour" ? "hours" : "degrees";
  return canonical === "" ? "none" : "unit?";
};

const isMagnitude = (card: ColumnCard): boolean =>
  card.means.endsWith("_mag") && findMeaning(card.means)?.unit === "mag";

/** A small choice of which no answer is a third one, to be asked. */
const Small = <V extends string>(props: {
  label: string;
  value: V | null;
  words: Readonly<Record<V, string>>;
  isOff: boolean;
  onValue: (value: V) => void;
}) => (
  <select
    aria-label={props.label}
    value={props.value ?? ""}
    disabled={props.isOff}
    className={`${BOX} mt-1 ${props.value === null ? "border-mark!" : ""}`}
    onChange={(event) => props.onValue(event.target.value as V)}
  >
    {props.value === null ? <option value="">which?</option> : null}
    {(Object.entries(props.words) as [V, string][]).map(([value, word]) => (
      <option key={value} value={value}>
        {word}
      </option>
    ))}
  </select>
);

/** What a unit alone does not say: the zero point of a magnitude, the cosine in a motion. */
const Convention = ({
  card,
  isOff,
  change,
}: {
  card: ColumnCard;
  isOff: boolean;
  change: (part: Partial<ColumnCard>) => void;
}) => {
  if (isMagnitude(card))
    return (
      <Small
        label={`Magnitude system of ${card.header}`}
        value={card.magnitudeSystem === undefined ? "vega" : card.magnitudeSystem}
        words={{ vega: "Vega", ab: "AB" }}
        isOff={isOff}
        onValue={(magnitudeSystem) => change({ magnitudeSystem })}
      />
    );
  if (card.means !== "pmra") return null;
  const has = card.hasCosDec === undefined ? true : card.hasCosDec;
  return (
    <Small
      label={`Cosine in ${card.header}`}
      value={has === null ? null : has ? "with" : "without"}
      words={{ with: "× cos δ", without: "without cos δ" }}
      isOff={isOff}
      onValue={(cosine) => change({ hasCosDec: cosine === "with" })}
    />
  );
};

interface Props {
  card: ColumnCard;
  suggestion: ColumnSuggestion | undefined;
  raUnit: ReadingPlan["raUnit"];
  isAsking: boolean;
  isReadOnly: boolean;
  onChange: (index: number, change: Partial<ColumnCard>) => void;
  /** Opens the values of the column. */
  onOpen: (header: string) => void;
}

/** One column of the file: what stands in it and how it is read. */
export const PlanRow = ({ card, suggestion, raUnit, isAsking, isReadOnly, onChange, onOpen }: Props) => {
  const meaning = findMeaning(card.means);
  const isUnused = card.means === KEPT;
  const isOwn = suggestion !== undefined && suggestion.means !== card.means;
  const change = (part: Partial<ColumnCard>) => onChange(card.index, part);
  return (
    <tr className={isAsking ? "bg-sel" : undefined}>
      <th scope="row" className="max-w-44 font-mono text-xs font-normal">
        <button
          type="button"
          title={`Values of ${card.header}`}
          onClick={() => onOpen(card.header)}
          className="block min-h-6 max-w-full truncate text-left underline decoration-edge underline-offset-4 hover:decoration-ink"
        >
          {card.header}
        </button>
      </th>
      <td className="max-w-52 truncate font-mono text-xs text-soft">
        <Sample suggestion={suggestion} />
      </td>
      <td className="w-56">
        <span className="flex items-center gap-1.5">
          {isAsking ? (
            <span className="text-mark">
              <span aria-hidden="true">◆</span>
              <span className="sr-only">Asks:</span>
            </span>
          ) : null}
          <MeaningChoice
            header={card.header}
            means={card.means}
            isOff={isReadOnly}
            onMeans={(means) => change({ means })}
          />
        </span>
      </td>
      <td className="w-32">
        {meaning?.kind === "number" ? (
          <LateText
            label={`Unit of ${card.header}`}
            value={card.unit}
            isOff={isReadOnly}
            placeholder={unitHint(card, meaning.unit, raUnit)}
            list={unitListId(meaning.unit)}
            onValue={(unit) => change({ unit })}
          />
        ) : (
          <span className="px-2 text-soft">–</span>
        )}
        <Convention card={card} isOff={isReadOnly} change={change} />
      </td>
      <td className="w-36">
        {isUnused ? (
          <span className="px-2 text-soft">–</span>
        ) : (
          <LateText
            label={`Blank marks of ${card.header}, with semicolons between`}
            value={card.blankMarks.join(`${BETWEEN} `)}
            isOff={isReadOnly}
            placeholder="empty"
            onValue={(text) =>
              change({
                blankMarks: [
                  ...new Set(
                    text
                      .split(BETWEEN)
                      .map((t) => t.trim())
                      .filter(Boolean),
                  ),
                ],
              })
            }
          />
        )}
      </td>
      <td className="min-w-40 max-w-72 text-[11.5px] leading-tight text-soft">
        {isOwn ? "chosen by hand" : suggestion?.because}
      </td>
    </tr>
  );
};

const unitListId = (canonical: string): string => `units-of-${canonical.replace(/[^a-z0-9]/gi, "-")}`;

/** Suggestions for the unit fields, once for all rows. */
export const UnitLists = () => {
  const units = [...new Set(MEANINGS.filter((m) => m.kind === "number").map((m) => m.unit))];
  return units.map((unit) => (
    <datalist key={unit} id={unitListId(unit)}>
      {unitChoices(unit)
        .filter((choice) => choice !== "")
        .map((choice) => (
          <option key={choice} value={choice} />
        ))}
    </datalist>
  ));
};
