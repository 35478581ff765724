import { useVirtualizer } from "@tanstack/react-virtual";
import { useRef, useState } from "react";
import type { ColumnCard, ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { Choice } from "./choice.tsx";
import { readText } from "./extract-words.ts";
import { meaningLabel } from "./plan-words.ts";

/** Room for an identifier of 19 digits. */
const COLUMN = 168;
const LINE = 64;
const TALLEST = 560;

interface Props {
  plan: ReadingPlan;
  preview: ExtractPreview;
}

type Row = ExtractPreview["rows"][number];

/** The value that is read, and below it the text it was read from where the two differ. */
const Cell = ({ card, row }: { card: ColumnCard; row: Row }) => {
  const { text = "", value = null } = row.cells[card.index] ?? {};
  if (card.means === KEPT) return <span className="block truncate text-soft">{text || "(empty)"}</span>;
  const isSame = value !== null && String(value) === text.trim();
  return (
    <>
      <span className={`block truncate ${value === null ? "text-soft" : ""}`}>
        {readText({ text, value })}
      </span>
      {isSame ? null : (
        <span className="block truncate text-[11px] text-soft" title={text}>
          {text === "" ? "(empty)" : text}
        </span>
      )}
    </>
  );
};

/** The columns in view, and the room that those before and after them take. */
const useSidewards = (columns: number) => {
  const scroller = useRef<HTMLElement>(null);
  const virtual = useVirtualizer({
    horizontal: true,
    count: columns,
    getScrollElement: () => scroller.current,
    estimateSize: () => COLUMN,
    overscan: 3,
    initialRect: { width: 1200, height: TALLEST },
  });
  const items = virtual.getVirtualItems();
  const width = virtual.getTotalSize();
  return { scroller, items, width, before: items[0]?.start ?? 0, after: width - (items.at(-1)?.end ?? 0) };
};

const CELL = "truncate border-b border-hair px-2.5 py-1 align-top font-normal";
const FIRST = "sticky left-0 border-r border-rule! bg-paper px-2 text-right";

/** Stands for the columns that are not in view. */
const Gap = ({ of }: { of: number }) => (of > 0 ? <td aria-hidden="true" className="p-0" /> : null);

const Head = ({ card, place }: { card: ColumnCard; place: number }) => (
  <th scope="col" aria-colindex={place} className={CELL}>
    <span className="block truncate font-semibold" title={card.header}>
      {card.header}
    </span>
    <span className="block truncate font-sans text-[11px] text-soft">
      {meaningLabel(card.means)}
      {card.unit ? `, ${card.unit}` : ""}
    </span>
  </th>
);

const Rows = ({ cards, rows }: { cards: readonly ColumnCard[]; rows: readonly Row[] }) => {
  const { scroller, items, width, before, after } = useSidewards(cards.length);
  const shown = items.flatMap(({ index }) => {
    const card = cards[index];
    return card ? [{ card, place: index + 2 }] : [];
  });
  return (
    <section
      ref={scroller}
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
      tabIndex={0}
      aria-label="Sampled rows; scrolls both ways"
      className="overflow-auto border-b border-rule"
      style={{ maxHeight: TALLEST }}
    >
      <table
        className="table-fixed border-separate border-spacing-0 text-left font-mono text-xs"
        aria-colcount={cards.length + 1}
        style={{ width: LINE + width }}
      >
        <caption className="sr-only">Sampled rows: the value read, and the text in the file below it</caption>
        <colgroup>
          <col style={{ width: LINE }} />
          {before > 0 ? <col style={{ width: before }} /> : null}
          {shown.map(({ card }) => (
            <col key={card.index} style={{ width: COLUMN }} />
          ))}
          {after > 0 ? <col style={{ width: after }} /> : null}
        </colgroup>
        <thead className="sticky top-0 z-20 bg-sheet">
          <tr>
            <th scope="col" aria-colindex={1} className={`${CELL} ${FIRST} bg-sheet! font-semibold!`}>
              Line
            </th>
            <Gap of={before} />
            {shown.map(({ card, place }) => (
              <Head key={card.index} card={card} place={place} />
            ))}
            <Gap of={after} />
          </tr>
        </thead>
        <tbody>
          {rows.map((row, r) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: the rows of a preview stay where they are
            <tr key={r} className="h-10">
              <th scope="row" aria-colindex={1} className={`${CELL} ${FIRST} z-10 text-soft`}>
                {row.line > 0 ? row.line : "–"}
              </th>
              <Gap of={before} />
              {shown.map(({ card, place }) => (
                <td key={card.index} aria-colindex={place} className={CELL}>
                  <Cell card={card} row={row} />
                </td>
              ))}
              <Gap of={after} />
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
};

type Which = "used" | "all";

/** Sampled rows as they are read under the plan, each value with the text it comes from. */
export const PreviewRows = ({ plan, preview }: Props) => {
  const used = plan.columns.filter((card) => card.means !== KEPT);
  const [which, setWhich] = useState<Which>(used.length > 0 ? "used" : "all");
  if (preview.rows.length === 0) return <p className="py-6 text-soft">No row could be read from the file.</p>;
  const cards = which === "used" ? used : plan.columns;
  return (
    <>
      <div className="mb-2 flex flex-wrap items-center gap-3">
        <Choice
          legend="Columns of the rows"
          value={which}
          onValue={setWhich}
          choices={[
            { value: "used", label: <>Used columns {count(used.length)}</> },
            { value: "all", label: <>All columns {count(plan.columns.length)}</> },
          ]}
        />
        <p className="text-xs text-soft">
          {count(preview.rows.length)} rows: the value that is read, and below it the text in the file.
        </p>
      </div>
      <Rows key={which} cards={cards} rows={preview.rows} />
    </>
  );
};
