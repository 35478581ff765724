import { useState } from "react";
import { COLUMNS, type Column, type ColumnGroup } from "#shared/catalogue/columns.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Checkbox, TextInput } from "#src/ui/inputs.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";

const GROUPS: readonly { group: ColumnGroup; label: string }[] = [
  { group: "identity", label: "Identity" },
  { group: "position", label: "Position" },
  { group: "brightness", label: "Brightness" },
  { group: "star", label: "Star" },
  { group: "zone", label: "Zone" },
  { group: "detectability", label: "Detectability" },
  { group: "flags", label: "Flags" },
];

interface Props {
  shown: readonly string[];
  onChange: (keys: readonly string[]) => void;
  onClose: () => void;
}

const matches = (column: Column, text: string): boolean =>
  `${column.key} ${column.label} ${column.description}`.toLowerCase().includes(text.trim().toLowerCase());

/** Chooses which columns the table shows, and in which order. */
export const ColumnsDialog = ({ shown, onChange, onClose }: Props) => {
  const [text, setText] = useState("");
  const found = (COLUMNS as readonly Column[]).filter((c) => c.key !== "designation" && matches(c, text));
  const toggle = (key: string) => {
    const next = shown.includes(key) ? shown.filter((k) => k !== key) : [...shown, key];
    if (next.length > 0) onChange(next);
  };
  const move = (key: string, by: -1 | 1) => {
    const at = shown.indexOf(key);
    const next = shown.filter((k) => k !== key);
    next.splice(at + by, 0, key);
    onChange(next);
  };
  return (
    <Dialog
      title="Columns"
      isOpen
      isWide
      onClose={onClose}
      footer={
        <Button kind="main" onClick={onClose}>
          Show the table
        </Button>
      }
    >
      <TextInput
        label="Search"
        type="search"
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      <div className="mt-4 gap-8 sm:columns-2">
        {GROUPS.map(({ group, label }) => {
          const columns = found.filter((c) => c.group === group);
          if (columns.length === 0) return null;
          return (
            <div key={group} className="break-inside-avoid">
              <SectionTitle>{label}</SectionTitle>
              {columns.map((c) => (
                <div key={c.key} className="flex items-center justify-between gap-2" title={c.description}>
                  <Checkbox
                    label={c.unitLabel === "–" ? c.label : `${c.label}, ${c.unitLabel}`}
                    checked={shown.includes(c.key)}
                    onChange={() => toggle(c.key)}
                  />
                  {shown.includes(c.key) ? (
                    <span className="flex">
                      <button
                        type="button"
                        className="size-6 text-soft disabled:opacity-30"
                        aria-label={`Move ${c.label} left`}
                        disabled={shown[0] === c.key}
                        onClick={() => move(c.key, -1)}
                      >
                        ←
                      </button>
                      <button
                        type="button"
                        className="size-6 text-soft disabled:opacity-30"
                        aria-label={`Move ${c.label} right`}
                        disabled={shown.at(-1) === c.key}
                        onClick={() => move(c.key, 1)}
                      >
                        →
                      </button>
                    </span>
                  ) : null}
                </div>
              ))}
            </div>
          );
        })}
      </div>
    </Dialog>
  );
};
