import type { Finding } from "#shared/api/extracts.ts";
import { RADIANS_PER_DEGREE } from "#shared/science/angles.ts";
import { accept, ask, isAccepted, roughly } from "./finding.ts";
import { columnOf, type Look, median, type UsedColumn } from "./look.ts";

const WITH = { value: "with-cos", label: "With cos δ" };
const WITHOUT = { value: "without-cos", label: "Without" };

/** Only there both conventions differ by more than a factor of two. */
const HIGH_DECLINATION = 60;
const LEAST_STARS = 3;
const BETTER = 3;
/** mas/yr: below it everything agrees. */
const LEAST_DIFFERENCE = 1;

/** The middle of how far two columns of motions lie apart, mas/yr. */
const apart = (
  mine: (row: number) => number,
  others: Float64Array,
  rows: readonly number[],
): { middle: number; count: number } => {
  const differences = rows
    .map((row) => Math.abs(mine(row) - (others[row] ?? Number.NaN)))
    .filter((d) => Number.isFinite(d));
  return { middle: median(differences), count: differences.length };
};

/** How well either convention fits what other extracts, which have the cosine, say of stars near a pole. */
const conventions = (
  look: Look,
  pmra: UsedColumn,
): { asWith: number; asWithout: number; count: number } | null => {
  const dec = columnOf(look, "dec");
  const others = look.knowledge.shared?.values.get("pmra");
  if (!dec || !others) return null;
  const rows = [...dec.values.keys()].filter((row) => Math.abs(dec.values[row] ?? 0) >= HIGH_DECLINATION);
  const value = (row: number): number => pmra.values[row] ?? Number.NaN;
  const cosine = (row: number): number => Math.cos((dec.values[row] ?? Number.NaN) * RADIANS_PER_DEGREE);
  const asWith = apart(value, others, rows);
  const asWithout = apart((row) => value(row) * cosine(row), others, rows);
  return asWith.count < LEAST_STARS
    ? null
    : { asWith: asWith.middle, asWithout: asWithout.middle, count: asWith.count };
};

const evidence = (fit: ReturnType<typeof conventions>): string =>
  fit
    ? ` For ${fit.count} shared stars beyond ±${HIGH_DECLINATION}° it differs from the other extracts by ${roughly(fit.asWith)} mas/yr if it is, and by ${roughly(fit.asWithout)} if it is not.`
    : "";

const cosine = (look: Look): Finding[] => {
  const pmra = columnOf(look, "pmra");
  if (!pmra) return [];
  const { hasCosDec, header } = pmra.card;
  const fit = conventions(look, pmra);
  const about = { column: header, count: fit?.count ?? pmra.given.length, answers: [WITH, WITHOUT] };
  if (hasCosDec === null)
    return [
      ask(
        "cos-dec",
        `The file does not say whether “${header}” is multiplied by the cosine of the declination.${evidence(fit)} At δ = 72° a star of 500 mas/yr would be misplaced by 5.0″ in 14.5 years by the wrong choice.`,
        "Say whether it is. Catalogues of the last decades have the cosine in it more often than not.",
        about,
      ),
    ];
  if (!fit || isAccepted(look.plan, "cos-dec-doubt", header)) return [];
  const [chosen, other] = hasCosDec === false ? [fit.asWithout, fit.asWith] : [fit.asWith, fit.asWithout];
  if (chosen < LEAST_DIFFERENCE || chosen < other * BETTER) return [];
  return [
    ask(
      "cos-dec-doubt",
      `“${header}” is read as ${hasCosDec === false ? "not multiplied" : "multiplied"} by the cosine of the declination.${evidence(fit)}`,
      "Change it, or say that it is right.",
      { ...about, answers: [hasCosDec === false ? WITH : WITHOUT, accept("It is right")] },
    ),
  ];
};

const swapped = (look: Look): Finding[] => {
  const [pmra, pmdec] = [columnOf(look, "pmra"), columnOf(look, "pmdec")];
  const { shared } = look.knowledge;
  const [ra, dec] = [shared?.values.get("pmra"), shared?.values.get("pmdec")];
  if (!pmra || !pmdec || !ra || !dec || isAccepted(look.plan, "motions-swapped")) return [];
  const rows = [...pmra.values.keys()];
  const [a, d] = [(r: number) => pmra.values[r] ?? Number.NaN, (r: number) => pmdec.values[r] ?? Number.NaN];
  const straight = apart(a, ra, rows);
  const crossed = Math.max(apart(a, dec, rows).middle, apart(d, ra, rows).middle);
  const asIs = Math.min(straight.middle, apart(d, dec, rows).middle);
  if (straight.count < LEAST_STARS || asIs < LEAST_DIFFERENCE || !(asIs > crossed * BETTER)) return [];
  return [
    ask(
      "motions-swapped",
      `“${pmra.card.header}” and “${pmdec.card.header}” fit the other extracts better when they change places: for ${straight.count} shared stars they differ by ${roughly(crossed)} mas/yr then, and by ${roughly(asIs)} as they stand.`,
      "Say whether they are to change places.",
      {
        column: null,
        count: straight.count,
        answers: [{ value: "swap", label: "Change places" }, accept("They are right as they are")],
      },
    ),
  ];
};

/** The two motions: their convention, and which is which. */
export const motionFindings = (look: Look): Finding[] => [...cosine(look), ...swapped(look)];
