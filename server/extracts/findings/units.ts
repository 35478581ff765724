import type { Finding } from "#shared/api/extracts.ts";
import { KEPT } from "#shared/catalogue/header-spellings.ts";
import { readUnit } from "#shared/units/read-unit.ts";
import { conversionTo } from "#shared/units/units.ts";
import { unitOf } from "../cells.ts";
import { doubtfulUnit, unitInName } from "../doubtful-units.ts";
import { readHeader } from "../read-header.ts";
import { accept, ask, isAccepted, note, quoted } from "./finding.ts";
import { columnOf, type Look, type UsedColumn } from "./look.ts";

const unknown = ({ plan }: Look, { card, meaning }: UsedColumn): Finding[] => {
  const unit = unitOf(card, plan);
  // An empty unit of RA is the question of hours or degrees, which is asked by itself.
  const isKnown = conversionTo(meaning.unit, unit) !== undefined || (card.means === "ra" && unit === "");
  if (isKnown) return [];
  return [
    ask(
      "unit-unknown",
      unit === ""
        ? `“${card.header}” has no unit.`
        : `The unit “${unit}” of “${card.header}” is not one that ${meaning.label} is known to come in.`,
      `Choose its unit; the catalogue keeps ${meaning.label} in ${meaning.unit || "pure numbers"}.`,
      { column: card.header },
    ),
  ];
};

/** Fewer values than this tell nothing about a unit. */
const LEAST_VALUES = 20;
const PARTNERS: Readonly<Record<string, string>> = { pmra: "pmdec", pmdec: "pmra" };

const isUnitSaid = ({ shown, card }: UsedColumn): boolean =>
  shown.column.unit.trim() !== "" || readHeader(card.header).unit !== "" || unitInName(card.header) !== "";

const rawNumbers = ({ shown, given, values }: UsedColumn): number[] =>
  given
    .filter((row) => !Number.isNaN(values[row] ?? Number.NaN))
    .map((row) => shown.values[row] ?? Number.NaN);

/** A unit that nobody wrote down, where the values fit another as well. */
const unwritten = (look: Look, u: UsedColumn): Finding[] => {
  const { card, meaning } = u;
  if (isUnitSaid(u) || card.unit !== meaning.unit || isAccepted(look.plan, "unit-doubt", card.header))
    return [];
  const partner = columnOf(look, PARTNERS[card.means] ?? "");
  const numbers = [u, ...(partner && !isUnitSaid(partner) ? [partner] : [])].flatMap(rawNumbers);
  const doubt = numbers.length < LEAST_VALUES ? null : doubtfulUnit(card.means, numbers);
  if (!doubt) return [];
  return [
    ask(
      "unit-doubt",
      `“${card.header}” has no unit, and its values fit more than one. ${doubt.why}.`,
      `Say whether it is ${doubt.units.map((unit) => unit || "a fraction").join(" or ")}.`,
      {
        column: card.header,
        count: numbers.length,
        answers: doubt.units.map((unit) =>
          unit === card.unit ? accept(unit || "A fraction") : { value: `unit:${unit}`, label: unit },
        ),
      },
    ),
  ];
};

/** Units on columns that nobody uses, kept as they are. */
const unused = ({ plan, sample }: Look): Finding[] => {
  const used = new Set(plan.columns.filter((c) => c.means !== KEPT).map((c) => c.index));
  const strange = sample.columns.filter(
    ({ column }, index) =>
      !used.has(index) && column.unit.trim() !== "" && readUnit(column.unit) === undefined,
  );
  if (strange.length === 0) return [];
  const names = strange.slice(0, 5).map(({ column }) => column.unit);
  return [
    note(
      "unit-unknown-unused",
      `${strange.length} unused ${strange.length === 1 ? "column has a unit" : "columns have units"} not known here: ${quoted([...new Set(names)])}.`,
      "Nothing needs to be done; the original keeps them.",
      { count: strange.length },
    ),
  ];
};

/** Units that are not known, not written down, or not needed. */
export const unitFindings = (look: Look): Finding[] => [
  ...look.used
    .filter((u) => u.meaning.kind === "number")
    .flatMap((u) => [...unknown(look, u), ...unwritten(look, u)]),
  ...unused(look),
];
