import { type DragEvent, useId, useState } from "react";
import { LIMITS } from "#shared/limits.ts";
import { sizeOf } from "./extract-words.ts";

interface Props {
  file: File | null;
  error: string | undefined;
  onFile: (file: File) => void;
  label?: string;
  /** What may be dropped here. */
  says?: string;
}

const TABLES =
  "or drop it here: delimited, fixed-width or byte-by-byte text, VOTable, FITS or ECSV, each also as .gz; up to 2 GiB";

/** What is wrong with a file before a byte of it is sent. */
export const refusalOf = (file: File | null): string | undefined => {
  if (!file) return "Choose a file first.";
  if (file.size > LIMITS.fileBytes)
    return `“${file.name}” has ${sizeOf(file.size)}; a file may have at most 2 GiB. Split it, or take less of the sky into one extract.`;
  return undefined;
};

/** A place to drop a file on, or to choose one. */
export const FileDrop = ({ file, error, onFile, label = "Choose file", says = TABLES }: Props) => {
  const id = useId();
  const [isOver, setOver] = useState(false);
  const onDrop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const dropped = event.dataTransfer.files[0];
    if (dropped) onFile(dropped);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping only adds to the file input inside
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={onDrop}
      className={`rounded border border-dashed p-5 text-center ${isOver ? "border-ink bg-sel" : error ? "border-mark" : "border-edge"}`}
    >
      <label
        htmlFor={id}
        className="inline-flex min-h-8 cursor-pointer items-center rounded border border-edge bg-sheet px-3 py-1 text-[13px] has-focus-visible:outline-2 has-focus-visible:outline-mark hover:bg-sel"
      >
        {file ? "Choose another file" : label}
        <input
          id={id}
          name="file"
          type="file"
          className="sr-only"
          aria-invalid={error ? true : undefined}
          aria-describedby={`${id}-says`}
          onChange={(event) => {
            const chosen = event.target.files?.[0];
            if (chosen) onFile(chosen);
          }}
        />
      </label>
      <p id={`${id}-says`} className="mt-2 wrap-anywhere">
        {file ? (
          <>
            {file.name} <span className="font-mono text-xs text-soft">{sizeOf(file.size)}</span>
          </>
        ) : (
          <span className="text-soft">{says}</span>
        )}
        {error ? (
          <span className="mt-1 block text-xs text-mark">
            <span aria-hidden="true">◆ </span>
            {error}
          </span>
        ) : null}
      </p>
    </div>
  );
};
