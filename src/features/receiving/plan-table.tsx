import { useState } from "react";
import type { ColumnCard, ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { count } from "#shared/format/numbers.ts";
import { Button } from "#src/ui/button.tsx";
import { Choice } from "./choice.tsx";
import { openOf } from "./extract-words.ts";
import { PlanRow, UnitLists } from "./plan-row.tsx";
import { meaningLabel } from "./plan-words.ts";

type Which = "all" | "used" | "asks";
const WORDS: Readonly<Record<Which, string>> = { all: "All", used: "Used", asks: "Asks" };

/** Rows drawn at first; a file may have 3 000 columns. */
const PORTION = 100;
/** From so many columns on, those that are not used are left out at first. */
const MANY = 60;

interface Props {
  plan: ReadingPlan;
  preview: ExtractPreview;
  findings: Finding[];
  isReadOnly: boolean;
  onCard: (index: number, change: Partial<ColumnCard>) => void;
  /** Opens the values of a column. */
  onOpen: (header: string) => void;
}

const useChosen = ({ plan, findings }: Props) => {
  const [which, setWhich] = useState<Which>(plan.columns.length > MANY ? "used" : "all");
  const [search, setSearch] = useState("");
  const [portions, setPortions] = useState(1);
  const asking = new Set(openOf(findings).map((f) => f.column));
  const isOf: Readonly<Record<Which, (card: ColumnCard) => boolean>> = {
    all: () => true,
    used: (card) => card.means !== KEPT || asking.has(card.header),
    asks: (card) => asking.has(card.header),
  };
  const word = search.trim().toLowerCase();
  const isFound = (card: ColumnCard) =>
    word === "" ||
    card.header.toLowerCase().includes(word) ||
    meaningLabel(card.means).toLowerCase().includes(word);
  const chosen = plan.columns.filter((card) => isOf[which](card) && isFound(card));
  const countOf = (w: Which) => plan.columns.filter(isOf[w]).length;
  return { which, setWhich, search, setSearch, portions, setPortions, asking, chosen, countOf };
};

const HEADS = ["In the file", "Text → value", "Means", "Unit", "Blank marks", "Because"];

/** The column cards: what each column of the file means, in which unit, and why it is thought so. */
export const PlanTable = (props: Props) => {
  const { preview, isReadOnly, onCard, onOpen } = props;
  const { which, setWhich, search, setSearch, portions, setPortions, asking, chosen, countOf } =
    useChosen(props);
  const suggestions = new Map(preview.columns.map((c) => [c.index, c]));
  const shown = chosen.slice(0, portions * PORTION);
  return (
    <section aria-label="Columns">
      <div className="mb-2 flex flex-wrap items-center gap-2">
        <Choice
          legend="Columns shown"
          value={which}
          onValue={setWhich}
          choices={(["all", "used", "asks"] as const).map((w) => ({
            value: w,
            label: (
              <>
                {WORDS[w]} <span className="font-mono text-xs">{count(countOf(w))}</span>
              </>
            ),
          }))}
        />
        <input
          type="text"
          aria-label="Find a column"
          placeholder="Find a column"
          value={search}
          onChange={(event) => setSearch(event.target.value)}
          className="min-h-7 w-44 rounded border border-edge bg-sheet px-2 text-[13px]"
        />
      </div>
      <UnitLists />
      <div className="overflow-x-auto border-b border-hair">
        <table className="w-full min-w-[860px] border-collapse text-left">
          <caption className="sr-only">Columns of the file and how they are read</caption>
          <thead>
            <tr className="bg-sheet">
              {HEADS.map((head) => (
                <th
                  key={head}
                  scope="col"
                  className="border-b border-rule px-2.5 py-2 font-mono text-xs font-semibold"
                >
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody className="[&_td]:border-b [&_td]:border-hair [&_td]:px-2.5 [&_td]:py-1 [&_th]:border-b [&_th]:border-hair [&_th]:px-2.5">
            {shown.map((card) => (
              <PlanRow
                key={card.index}
                card={card}
                suggestion={suggestions.get(card.index)}
                raUnit={props.plan.raUnit}
                isAsking={asking.has(card.header)}
                isReadOnly={isReadOnly}
                onChange={onCard}
                onOpen={onOpen}
              />
            ))}
          </tbody>
        </table>
      </div>
      {chosen.length === 0 ? (
        <p className="py-6 text-soft">
          {which === "asks" && search === "" ? "No column asks anything." : "No column fits."}
        </p>
      ) : null}
      {chosen.length > shown.length ? (
        <Button className="mt-3" onClick={() => setPortions(portions + 1)}>
          Show {count(Math.min(PORTION, chosen.length - shown.length))} more of{" "}
          {count(chosen.length - shown.length)}
        </Button>
      ) : null}
    </section>
  );
};
