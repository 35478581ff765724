import { type FormEvent, useState } from "react";
import { count } from "#shared/format/numbers.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { TextInput } from "#src/ui/inputs.tsx";

/** Asks for a row's number, from 1. */
export const GoToRowDialog = ({
  rows,
  onGo,
  onClose,
}: {
  rows: number;
  onGo: (index: number) => void;
  onClose: () => void;
}) => {
  const [text, setText] = useState("");
  const row = Number(text.replaceAll(/[\s\u2009,]/g, ""));
  const isRow = Number.isInteger(row) && row >= 1 && row <= rows;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (isRow) onGo(row - 1);
  };
  return (
    <Dialog title="Go to a row" isOpen onClose={onClose}>
      <form onSubmit={submit} className="flex items-end gap-3">
        <TextInput
          label={`Row, 1 to ${count(rows)}`}
          isNumber
          value={text}
          onChange={(event) => setText(event.target.value)}
          error={text === "" || isRow ? undefined : `Write a whole number from 1 to ${count(rows)}.`}
        />
        <Button type="submit" kind="main" disabled={!isRow}>
          Go
        </Button>
      </form>
    </Dialog>
  );
};
