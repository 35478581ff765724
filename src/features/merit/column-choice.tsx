import { COLUMNS, type Column, type ColumnGroup, findColumn, isNumeric } from "#shared/catalogue/columns.ts";
import { NUMERIC_UNITS } from "#shared/expression/names.ts";

const GROUPS: Readonly<Record<ColumnGroup, string>> = {
  identity: "Identity",
  position: "Position",
  brightness: "Brightness",
  star: "Star",
  zone: "Zone",
  detectability: "Detectability",
  flags: "Flags",
};

/** Unit in which a formula reckons, where it is one column; what a person types for the shape is in it. */
export const unitOf = (expression: string): string => {
  const name = expression.trim();
  const column = NUMERIC_UNITS.get(name) ? findColumn(name.replace(/_err$/, "")) : undefined;
  // A unit is shown in the stored scale: a column that the table shows in percent reckons in fractions.
  return column && column.shownFactor === undefined ? column.unitLabel : "";
};

/** Says in which unit the shape's figures are, where the table shows another. */
export const unitHint = (expression: string): string | undefined => {
  const column = findColumn(expression.trim());
  if (!column) return undefined;
  if (column.shownFactor)
    return `${column.description}. Here as a fraction; the table shows it in ${column.unitLabel}.`;
  return `${column.description}${column.unit === "" ? "" : `, in ${column.unitLabel}`}.`;
};

/** Puts the name of a column into the formula. */
export const ColumnChoice = ({
  disabled,
  onChoose,
}: {
  disabled: boolean;
  onChoose: (key: string) => void;
}) => (
  <select
    aria-label="Take a column"
    disabled={disabled}
    value=""
    onChange={(event) => onChoose(event.target.value)}
    className="min-h-8 w-32 flex-none rounded border border-edge bg-sheet px-2 py-1 text-[13px] text-ink"
  >
    <option value="">Take a column</option>
    {Object.entries(GROUPS).map(([group, label]) => {
      const columns = COLUMNS.filter((c: Column) => c.group === group && isNumeric(c));
      return columns.length === 0 ? null : (
        <optgroup key={group} label={label}>
          {columns.map(({ key, label: name }) => (
            <option key={key} value={key}>
              {name} ({key})
            </option>
          ))}
        </optgroup>
      );
    })}
  </select>
);
