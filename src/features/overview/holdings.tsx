import { Link } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import { count } from "#shared/format/numbers.ts";
import type { Action } from "#shared/policy/rights.ts";
import { paths, type Screen } from "#src/app/paths.ts";
import { useCan } from "#src/lib/rights.ts";

interface Holding {
  key: keyof Programme["counts"];
  one: string;
  many: string;
  screen: Screen;
  right: Action;
}

const HOLDINGS: readonly Holding[] = [
  { key: "extracts", one: "Extract", many: "Extracts", screen: "extracts", right: "extract.read" },
  {
    key: "instruments",
    one: "Instrument",
    many: "Instruments",
    screen: "instruments",
    right: "instrument.read",
  },
  { key: "selections", one: "Selection", many: "Selections", screen: "catalogue", right: "selection.read" },
  { key: "merits", one: "Figure of merit", many: "Figures of merit", screen: "merit", right: "merit.read" },
  { key: "lists", one: "Target list", many: "Target lists", screen: "lists", right: "list.read" },
  { key: "members", one: "Member", many: "Members", screen: "settings", right: "member.read" },
];

/** How much there is of everything, each leading to it. */
export const Holdings = ({ programme }: { programme: Programme }) => {
  const can = useCan();
  return (
    <section aria-label="What the programme holds" className="mt-8">
      <ul className="grid grid-cols-2 border-t border-l border-rule sm:grid-cols-3 lg:grid-cols-6">
        {HOLDINGS.filter(({ right }) => can(right)).map(({ key, one, many, screen }) => (
          <li key={key} className="border-r border-b border-rule">
            <Link
              to={paths.programme.to(programme.id, screen)}
              className="flex h-full flex-col px-4 py-3 hover:bg-sheet"
            >
              <span className="font-mono text-[24px]">{count(programme.counts[key])}</span>
              <span className="text-soft">{programme.counts[key] === 1 ? one : many}</span>
            </Link>
          </li>
        ))}
      </ul>
    </section>
  );
};
