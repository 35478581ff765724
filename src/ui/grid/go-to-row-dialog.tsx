import { type FormEvent, useState } from "react";
import { count } from "#shared/format/numbers.ts";
import { Button } from "../button.tsx";
import { Dialog } from "../dialog.tsx";
import { TextInput } from "../inputs.tsx";

interface Props {
  rows: number;
  /** What a row's number is called there: "row", or "place" in a list. */
  word: "row" | "place";
  onGo: (index: number) => void;
  onClose: () => void;
}

/** Asks for a row's number, from 1, and goes there. */
export const GoToRowDialog = ({ rows, word, onGo, onClose }: Props) => {
  const [text, setText] = useState("");
  const row = Number(text.replaceAll(/[\s\u2009,]/g, ""));
  const isRow = Number.isInteger(row) && row >= 1 && row <= rows;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (isRow) onGo(row - 1);
  };
  return (
    <Dialog title={`Go to a ${word}`} isOpen onClose={onClose}>
      <form onSubmit={submit} className="flex items-end gap-3">
        <TextInput
          label={`${word === "row" ? "Row" : "Place"}, 1 to ${count(rows)}`}
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
