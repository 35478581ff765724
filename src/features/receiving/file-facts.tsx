import type { Extract, ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { count } from "#shared/format/numbers.ts";
import { readingOf } from "./extract-words.ts";

interface Props {
  extract: Extract;
  plan: ReadingPlan;
  preview: ExtractPreview;
}

const asItIs = (preview: ExtractPreview, plan: ReadingPlan): string => {
  const words = readingOf({ ...plan, format: preview.format });
  // Of delimited text the variant is the delimiter, which is named already.
  return preview.variant === "" || preview.format === "delimited" ? words : `${words} (${preview.variant})`;
};

/** What the file was taken for, and what it says of itself. */
export const FileFacts = ({ extract, plan, preview }: Props) => (
  <section aria-label="What the file was taken for" className="mb-4 border-y border-hair py-2.5">
    <p className="wrap-anywhere">
      <span className="text-soft">Read as</span> {asItIs(preview, plan)}
      {preview.title ? (
        <>
          <span className="text-soft">; it calls itself</span> “{preview.title}”
        </>
      ) : null}
    </p>
    <p className="text-soft">
      <span className="font-mono text-ink">{count(preview.sampledRows)}</span> rows looked at
      {preview.declaredRows === null ? null : (
        <>
          ; the file says that it has{" "}
          <span className="font-mono text-ink">{count(preview.declaredRows)}</span>
        </>
      )}
      {extract.companion ? `; its columns are described in ${extract.companion.fileName}` : ""}. All rows are
      read when the extract is committed. Nothing is stored yet.
    </p>
    {preview.description || preview.sources.length > 0 ? (
      <details className="mt-1">
        <summary className="min-h-6 text-soft">What the file says of itself</summary>
        {preview.description ? (
          <p className="mt-1 max-w-3xl whitespace-pre-line wrap-anywhere">{preview.description}</p>
        ) : null}
        <ul className="mt-1 max-w-3xl text-[13px] text-soft">
          {[...new Set(preview.sources)].map((source) => (
            <li key={source} className="wrap-anywhere">
              {source}
            </li>
          ))}
        </ul>
      </details>
    ) : null}
  </section>
);
