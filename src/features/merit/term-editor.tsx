import type { Term } from "#shared/api/merits.ts";
import { parseNumber } from "#shared/expression/parse.ts";
import { Button } from "#src/ui/button.tsx";
import { Field } from "#src/ui/field.tsx";
import { Checkbox, Select, TextInput } from "#src/ui/inputs.tsx";
import { ColumnChoice, unitHint, unitOf } from "./column-choice.tsx";
import { ShapeFields } from "./shape-fields.tsx";
import { ShapePicture } from "./shape-picture.tsx";
import { shapeDrawn, type TermDraft } from "./term-draft.ts";
import { WeightInput } from "./weight-input.tsx";

const BLANKS: Readonly<Record<Term["blanks"], string>> = {
  zero: "counts 0",
  neutral: "counts one half",
  "drop-term": "leaves this term out",
  hold: "holds the star (no merit)",
};

interface Props {
  draft: TermDraft;
  index: number;
  count: number;
  /** This term's part of all weights, 0 to 1; null while a weight is no figure. */
  share: number | null;
  color: string;
  fields: Readonly<Record<string, string>>;
  disabled: boolean;
  onChange: (change: Partial<TermDraft>) => void;
  onMove: (by: -1 | 1) => void;
  onRemove: () => void;
}

/** What is wrong with a formula while it is typed, with the place where it stands. */
const refusalOf = (expression: string): string | undefined => {
  if (expression.trim() === "") return undefined;
  const parsed = parseNumber(expression);
  if (parsed.ok) return undefined;
  const at = parsed.position === null ? "" : ` (at character ${parsed.position + 1})`;
  return `${parsed.message}${at} ${parsed.hint}`;
};

const TermHead = ({ draft, index, count, share, color, disabled, onMove, onRemove }: Props) => (
  <div className="mb-3 flex flex-wrap items-center gap-2">
    <span aria-hidden="true" className="size-3 flex-none" style={{ background: color }} />
    <h2 className="grow font-sans! text-sm font-medium">
      {index + 1}. {draft.label.trim() || "New term"}
      {share === null ? null : (
        <span className="ml-2 font-mono text-xs font-normal text-soft">
          {(100 * share).toFixed(0)} % of the weight
        </span>
      )}
    </h2>
    {disabled ? null : (
      <>
        <Button aria-label={`Move term ${index + 1} up`} disabled={index === 0} onClick={() => onMove(-1)}>
          ↑
        </Button>
        <Button
          aria-label={`Move term ${index + 1} down`}
          disabled={index === count - 1}
          onClick={() => onMove(1)}
        >
          ↓
        </Button>
        <Button aria-label={`Remove term ${index + 1}`} disabled={count === 1} onClick={onRemove}>
          Remove
        </Button>
      </>
    )}
  </div>
);

/** One term: what it looks at, what a value counts for, how much it weighs, what a blank does. */
export const TermEditor = (props: Props) => {
  const { draft, index, fields, disabled, onChange } = props;
  const path = `terms.${index}`;
  return (
    <li className="border-t border-hair py-4">
      <TermHead {...props} />
      <div className="grid gap-x-6 gap-y-3 md:grid-cols-[minmax(0,1fr)_15rem]">
        <div className="flex flex-col gap-3">
          <div className="grid gap-3 sm:grid-cols-[10rem_minmax(0,1fr)]">
            <TextInput
              label="Name"
              name={`${path}.label`}
              autoComplete="off"
              disabled={disabled}
              value={draft.label}
              error={fields[`${path}.label`]}
              onChange={(event) => onChange({ label: event.target.value })}
            />
            <Field
              label="Looks at"
              hint={unitHint(draft.expression)}
              error={refusalOf(draft.expression) ?? fields[`${path}.expression`]}
            >
              {(ids) => (
                <>
                  <input
                    {...ids}
                    name={`${path}.expression`}
                    autoComplete="off"
                    spellCheck={false}
                    disabled={disabled}
                    value={draft.expression}
                    onChange={(event) => onChange({ expression: event.target.value })}
                    className="min-h-8 w-full min-w-0 rounded border border-edge bg-sheet px-2.5 py-1 font-mono text-[13px] text-blue aria-invalid:border-mark"
                  />
                  <ColumnChoice disabled={disabled} onChoose={(expression) => onChange({ expression })} />
                </>
              )}
            </Field>
          </div>
          <div className="flex flex-wrap items-start gap-x-6 gap-y-3">
            <WeightInput
              name={`${path}.weight`}
              weight={draft.weight}
              error={fields[`${path}.weight`]}
              disabled={disabled}
              onChange={(weight) => onChange({ weight })}
            />
            <ShapeFields {...{ draft, path, fields, disabled, onChange }} unit={unitOf(draft.expression)} />
          </div>
          <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
            <div className="w-56">
              <Select
                label="A blank value"
                name={`${path}.blanks`}
                disabled={disabled}
                value={draft.blanks}
                onChange={(event) => onChange({ blanks: event.target.value as Term["blanks"] })}
              >
                {Object.entries(BLANKS).map(([rule, words]) => (
                  <option key={rule} value={rule}>
                    {words}
                  </option>
                ))}
              </Select>
            </div>
            <div className="pb-1">
              <Checkbox
                label="Zero here makes the whole merit zero"
                disabled={disabled}
                checked={draft.zeroZeroesAll}
                onChange={(event) => onChange({ zeroZeroesAll: event.target.checked })}
              />
            </div>
          </div>
        </div>
        <ShapePicture shape={shapeDrawn(draft)} unit={unitOf(draft.expression)} />
      </div>
    </li>
  );
};
