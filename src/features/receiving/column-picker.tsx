import { type FormEvent, useId, useState } from "react";
import { Button } from "#src/ui/button.tsx";

interface Props {
  columns: readonly { header: string }[];
  value: string;
  onValue: (header: string) => void;
}

/** A column by its header; typing finds it among thousands. */
export const ColumnPicker = ({ columns, value, onValue }: Props) => {
  const id = useId();
  const [text, setText] = useState(value);
  const [before, setBefore] = useState(value);
  if (before !== value) {
    setBefore(value);
    setText(value);
  }
  const at = columns.findIndex((c) => c.header === value);
  const isUnknown = text !== value && !columns.some((c) => c.header === text);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const word = text.trim().toLowerCase();
    const found =
      columns.find((c) => c.header.toLowerCase() === word) ??
      columns.find((c) => c.header.toLowerCase().includes(word));
    if (found) onValue(found.header);
  };
  const step = (by: number) => {
    const next = columns[at + by];
    if (next) onValue(next.header);
  };
  return (
    <form onSubmit={submit} className="flex flex-wrap items-end gap-2">
      <label className="flex flex-col gap-1 font-medium" htmlFor={id}>
        Column
        <input
          id={id}
          list={`${id}-all`}
          value={text}
          autoComplete="off"
          className="min-h-8 w-56 rounded border border-edge bg-sheet px-2.5 font-mono text-[13px] font-normal"
          onChange={(event) => {
            setText(event.target.value);
            if (columns.some((c) => c.header === event.target.value)) onValue(event.target.value);
          }}
        />
      </label>
      <datalist id={`${id}-all`}>
        {columns.map((c) => (
          <option key={c.header} value={c.header} />
        ))}
      </datalist>
      <Button disabled={at <= 0} onClick={() => step(-1)} aria-label="Column before">
        ←
      </Button>
      <Button disabled={at < 0 || at >= columns.length - 1} onClick={() => step(1)} aria-label="Next column">
        →
      </Button>
      {isUnknown ? (
        <span className="pb-1.5 text-xs text-soft">Enter goes to the first that fits.</span>
      ) : null}
    </form>
  );
};
