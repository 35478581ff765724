import type { Shape } from "#shared/api/merits.ts";
import { Select, TextArea, TextInput } from "#src/ui/inputs.tsx";
import { SHAPE_FIGURES, type TermDraft } from "./term-draft.ts";

const KINDS: Readonly<Record<Shape["kind"], string>> = {
  ramp: "Ramp",
  step: "Step",
  hump: "Hump",
  loss: "Loss per unit",
  table: "Table",
};

interface Props {
  draft: TermDraft;
  /** Where the term stands in the form, e.g. `terms.0`. */
  path: string;
  fields: Readonly<Record<string, string>>;
  unit: string;
  disabled: boolean;
  onChange: (change: Partial<TermDraft>) => void;
}

/** What a value counts for: the kind of shape and its figures. */
export const ShapeFields = ({ draft, path, fields, unit, disabled, onChange }: Props) => (
  <div className="flex flex-wrap items-start gap-3">
    <div className="w-36">
      <Select
        label="Shape"
        name={`${path}.shape`}
        disabled={disabled}
        value={draft.kind}
        error={fields[`${path}.shape`] ?? fields[`${path}.shape.points`]}
        onChange={(event) => onChange({ kind: event.target.value as Shape["kind"] })}
      >
        {Object.entries(KINDS).map(([kind, label]) => (
          <option key={kind} value={kind}>
            {label}
          </option>
        ))}
      </Select>
    </div>
    {SHAPE_FIGURES[draft.kind].map(([name, label]) => (
      <TextInput
        key={name}
        isNumber
        label={unit === "" || draft.kind === "loss" ? label : `${label} (${unit})`}
        name={`${path}.shape.${name}`}
        autoComplete="off"
        disabled={disabled}
        value={draft.figures[name] ?? ""}
        error={fields[`${path}.shape.${name}`]}
        onChange={(event) => onChange({ figures: { ...draft.figures, [name]: event.target.value } })}
      />
    ))}
    {draft.kind === "step" ? (
      <Select
        label="Counts 1"
        name={`${path}.shape.above`}
        disabled={disabled}
        value={draft.isAbove ? "above" : "below"}
        onChange={(event) => onChange({ isAbove: event.target.value === "above" })}
      >
        <option value="above">from there on</option>
        <option value="below">up to there</option>
      </Select>
    ) : null}
    {draft.kind === "table" ? (
      <div className="min-w-48 grow">
        <TextArea
          label="Points"
          name={`${path}.shape.table`}
          hint="A line each: the value, then what it gives from 0 to 1. Straight lines between, flat outside."
          disabled={disabled}
          value={draft.table}
          error={fields[`${path}.shape.table`]}
          onChange={(event) => onChange({ table: event.target.value })}
          className="font-mono"
        />
      </div>
    ) : null}
  </div>
);
