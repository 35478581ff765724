import { useState } from "react";
import { TextInput } from "#src/ui/inputs.tsx";
import { epochText, NO_YEAR, yearOf } from "./extract-words.ts";

interface Props {
  label: string;
  value: number | null;
  isReadOnly: boolean;
  placeholder?: string;
  onValue: (year: number | null) => void;
}

/** A Julian year, taken over when the person leaves the field or presses Enter; empty is no answer. */
export const YearField = ({ label, value, isReadOnly, placeholder = "2000.0", onValue }: Props) => {
  const shown = value === null ? "" : epochText(value);
  const [text, setText] = useState(shown);
  const [before, setBefore] = useState(shown);
  if (before !== shown) {
    setBefore(shown);
    setText(shown);
  }
  const year = yearOf(text);
  const isWrong = text.trim() !== "" && year === undefined;
  const take = (): void => {
    if (!isWrong && text !== shown) onValue(year ?? null);
  };
  return (
    <TextInput
      label={label}
      inputMode="decimal"
      autoComplete="off"
      placeholder={placeholder}
      className="font-mono"
      value={text}
      error={isWrong ? NO_YEAR : undefined}
      disabled={isReadOnly}
      onChange={(event) => setText(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => {
        if (event.key === "Enter") take();
      }}
    />
  );
};
