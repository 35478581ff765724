import type { StarSheet as Sheet } from "#shared/api/stars.ts";
import { findColumn } from "#shared/catalogue/columns.ts";
import { count } from "#shared/format/numbers.ts";
import { SectionTitle } from "#src/ui/section-title.tsx";

/** By which relation each value came about, and every extract's own words on the star. */
export const StarOrigins = ({ star }: { star: Sheet }) => (
  <>
    <SectionTitle>Where the values come from</SectionTitle>
    <dl className="grid grid-cols-[auto_1fr] gap-x-3 gap-y-1 text-xs">
      {Object.entries(star.methods).map(([key, word]) => (
        <div key={key} className="contents">
          <dt>{findColumn(key)?.label ?? key}</dt>
          <dd className="text-soft">{word}</dd>
        </div>
      ))}
    </dl>
    {star.entries.map((entry) => (
      <details
        key={`${entry.extractId}-${entry.rowNumber}`}
        className="mt-2 border-t border-hair pt-1.5 text-xs"
      >
        <summary>
          Extract {entry.extractNumber}, {entry.extractName}, row {count(entry.rowNumber)}
        </summary>
        <dl className="mt-1 grid grid-cols-[1fr_auto] gap-x-3 font-mono">
          {entry.sourceId === null ? null : (
            <>
              <dt className="font-sans text-soft">Identifier{entry.release ? `, ${entry.release}` : ""}</dt>
              <dd>{entry.sourceId}</dd>
            </>
          )}
          {Object.entries(entry.values).map(([key, value]) => (
            <div key={key} className="contents">
              <dt className="text-soft">{key}</dt>
              <dd className="text-right">{String(value)}</dd>
            </div>
          ))}
        </dl>
      </details>
    ))}
  </>
);
