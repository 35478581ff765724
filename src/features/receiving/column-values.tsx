import { useSearchParams } from "react-router-dom";
import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { binned } from "./bins.ts";
import { ColumnPicker } from "./column-picker.tsx";
import { readText } from "./extract-words.ts";
import { meaningLabel } from "./plan-words.ts";
import { ValueHistogram } from "./value-histogram.tsx";

const BARS = 24;

interface Props {
  plan: ReadingPlan;
  preview: ExtractPreview;
}

/** The column that the address names, else the first one that is used and has a number. */
const useColumn = ({ plan, preview }: Props) => {
  const [params, setParams] = useSearchParams();
  const named = plan.columns.find((card) => card.header === params.get("column"));
  const isNumber = (index: number) => preview.rows.some((row) => typeof row.cells[index]?.value === "number");
  const card = named ?? plan.columns.find((c) => c.means !== KEPT && isNumber(c.index)) ?? plan.columns[0];
  const choose = (header: string) =>
    setParams((before) => new URLSearchParams({ ...Object.fromEntries(before), column: header }), {
      replace: true,
    });
  return { card, choose };
};

/** One column of the sampled rows: what stands in it, what is read from it, and how that is spread. */
export const ColumnValues = ({ plan, preview }: Props) => {
  const { card, choose } = useColumn({ plan, preview });
  if (!card) return <p className="py-6 text-soft">The file has no column.</p>;
  const cells = preview.rows.map((row) => ({ line: row.line, ...row.cells[card.index] }));
  const bins = binned(
    cells.flatMap(({ value }) => (typeof value === "number" ? [value] : [])),
    BARS,
  );
  const blanks = cells.filter(({ value }) => value === null || value === undefined).length;
  return (
    <div className="grid gap-x-8 gap-y-4 2xl:grid-cols-[minmax(0,1fr)_20rem]">
      <div>
        <ColumnPicker columns={plan.columns} value={card.header} onValue={choose} />
        <p className="my-3">
          <span className="font-mono text-[13px] wrap-anywhere">{card.header}</span> →{" "}
          {meaningLabel(card.means)}
          <span className="text-soft">
            {card.unit ? ` in ${card.unit}` : ""}; {count(cells.length)} rows shown, {count(blanks)} of them
            blank
          </span>
        </p>
        {bins ? (
          <ValueHistogram bins={bins} unit={card.unit} />
        ) : (
          <p className="text-soft">No number is read from this column in the rows shown.</p>
        )}
      </div>
      <table className="self-start text-left">
        <caption className="sr-only">{`Texts of ${card.header} and what is read from them`}</caption>
        <thead>
          <tr className="border-b border-rule font-mono text-xs">
            <th scope="col" className="pr-4 text-right font-semibold">
              Line
            </th>
            <th scope="col" className="pr-4 font-semibold">
              In the file
            </th>
            <th scope="col" className="font-semibold">
              Value
            </th>
          </tr>
        </thead>
        <tbody className="font-mono text-xs">
          {cells.map(({ line, text = "", value = null }, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: the rows of a preview stay where they are
            <tr key={i} className="border-b border-hair">
              <td className="pr-4 text-right text-soft">{line > 0 ? line : "–"}</td>
              <td className="max-w-40 truncate pr-4 text-soft" title={text}>
                {text === "" ? "(empty)" : text}
              </td>
              <td className={`max-w-40 truncate ${value === null ? "text-soft" : ""}`}>
                {card.means === KEPT ? text : readText({ text, value })}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
};
