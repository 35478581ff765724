import { type FormEvent, useState } from "react";
import { COLUMNS, type Column, isNumeric } from "#shared/catalogue/columns.ts";
import type { BlankRule, Cut } from "#shared/catalogue/view.ts";
import { parseCondition } from "#shared/expression/parse.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Select, TextArea, TextInput } from "#src/ui/inputs.tsx";

interface Props {
  /** The cut to change; null for a new one. */
  cut: Cut | null;
  onSave: (cut: Cut) => void;
  onClose: () => void;
}

const NUMERIC = (COLUMNS as readonly Column[]).filter(isNumeric);

/** A range as a condition; the upper end is left out, so that two ranges that meet share no star. */
const rangeExpression = (key: string, from: string, to: string): string => {
  const [low, high] = [from.trim(), to.trim()];
  if (low && high) return `${low} <= ${key} < ${high}`;
  return low ? `${key} >= ${low}` : high ? `${key} < ${high}` : "";
};

const isNumber = (text: string): boolean =>
  text.trim() === "" || Number.isFinite(Number(text.trim().replace("\u2212", "-")));

/** Makes a cut from a column and a range, or from a formula; says what it does with blanks. */
export const CutDialog = ({ cut, onSave, onClose }: Props) => {
  const [label, setLabel] = useState(cut?.label ?? "");
  const [isFormula, setFormula] = useState(cut !== null);
  const [key, setKey] = useState("teff");
  const [from, setFrom] = useState("");
  const [to, setTo] = useState("");
  const [formula, setFormulaText] = useState(cut?.expression ?? "");
  const [blanks, setBlanks] = useState<BlankRule>(cut?.blanks ?? "drop");
  const [wasTried, setTried] = useState(false);
  const column = NUMERIC.find((c) => c.key === key);
  const expression = (isFormula ? formula.trim() : rangeExpression(key, from, to)).replaceAll("\u2212", "-");
  const parsed = expression ? parseCondition(expression) : null;
  const error = !wasTried
    ? undefined
    : !parsed
      ? "Say what the cut asks."
      : parsed.ok
        ? undefined
        : `${parsed.message} ${parsed.hint}`;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (parsed?.ok) onSave({ label: label.trim(), expression, blanks });
  };
  return (
    <Dialog title={cut ? "Change the cut" : "Add a cut"} isOpen onClose={onClose}>
      <form onSubmit={submit} className="flex flex-col gap-4" noValidate>
        {cut ? null : (
          <div className="flex gap-2">
            <Button
              aria-pressed={!isFormula}
              kind={isFormula ? "quiet" : "main"}
              onClick={() => setFormula(false)}
            >
              By range
            </Button>
            <Button
              aria-pressed={isFormula}
              kind={isFormula ? "main" : "quiet"}
              onClick={() => {
                setFormulaText(formula || rangeExpression(key, from, to));
                setFormula(true);
              }}
            >
              Write as formula
            </Button>
          </div>
        )}
        {isFormula ? (
          <TextArea
            label="Condition"
            hint="Columns by name, < <= > >= == !=, + − * / ^, and, or, not, brackets. For example 2600 <= teff < 3900 and ruwe < 1.4"
            error={error}
            value={formula}
            onChange={(event) => setFormulaText(event.target.value)}
            className="font-mono text-blue"
            spellCheck={false}
          />
        ) : (
          <>
            <Select
              label="Column"
              value={key}
              onChange={(event) => setKey(event.target.value)}
              hint={column?.description}
            >
              {NUMERIC.map((c) => (
                <option key={c.key} value={c.key}>
                  {`${c.label} (${c.key})${c.unit ? `, ${c.unit}` : ""}`}
                </option>
              ))}
            </Select>
            <div className="flex flex-wrap gap-4">
              <TextInput
                label="From"
                isNumber
                unit={column?.unit}
                value={from}
                onChange={(event) => setFrom(event.target.value)}
                error={isNumber(from) ? undefined : "Write a number with a point, for example 0.35."}
              />
              <TextInput
                label="To, not itself"
                isNumber
                unit={column?.unit}
                value={to}
                onChange={(event) => setTo(event.target.value)}
                error={isNumber(to) ? undefined : "Write a number with a point, for example 0.35."}
              />
            </div>
            {error ? <p className="text-xs text-mark">◆ {error}</p> : null}
            {key === "transit_probability" ? (
              <p className="text-xs text-soft">A fraction here: 0.014 is 1.4 %.</p>
            ) : null}
          </>
        )}
        <Select
          label="Stars for which a value is blank"
          value={blanks}
          onChange={(event) => setBlanks(event.target.value as BlankRule)}
        >
          <option value="drop">Drop them</option>
          <option value="keep">Keep them</option>
        </Select>
        <TextInput
          label="Name (optional)"
          value={label}
          maxLength={120}
          onChange={(event) => setLabel(event.target.value)}
        />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" kind="main">
            {cut ? "Change the cut" : "Add the cut"}
          </Button>
        </div>
      </form>
    </Dialog>
  );
};
