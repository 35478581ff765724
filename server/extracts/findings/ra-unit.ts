import type { Finding } from "#shared/api/extracts.ts";
import { conversionTo } from "#shared/units/units.ts";
import { ask, said } from "./finding.ts";
import { columnOf, type Look, type UsedColumn } from "./look.ts";

const LEAST_ROWS_FOR_DOUBT = 50;
const WIDE_DEGREES = 60;
const HOURS = 24;
/** Beyond it the declinations are no radians. */
const RIGHT_ANGLE = Math.PI / 2;

/** Numbers as the file has them, not as any unit reads them. Sexagesimal texts are none. */
const numbersOf = ({ shown, given }: UsedColumn): number[] =>
  given.map((row) => shown.values[row] ?? Number.NaN).filter((v) => !Number.isNaN(v));

const spanOf = (values: readonly number[]): [number, number] =>
  values.reduce(([least, most], v) => [Math.min(least, v), Math.max(most, v)], [Infinity, -Infinity]);

const degrees = (value: number): string => `${said(Math.round(value * 10) / 10)}°`;

/** Whether RA is in hours, where the file does not say or its values speak against what it says. */
export const raUnitFindings = (look: Look): Finding[] => {
  const [ra, dec] = [columnOf(look, "ra"), columnOf(look, "dec")];
  if (!ra || !dec || look.plan.raUnit !== null || look.plan.frame === "galactic") return [];
  const { unit, header } = ra.card;
  const ras = numbersOf(ra);
  const [least, most] = spanOf(ras);
  if (unit === "" && most >= HOURS)
    return [ask("unit-unknown", `“${header}” has no unit.`, "Choose its unit.", { column: header })];
  if (ras.length === 0 || least < 0 || most >= HOURS) return [];
  const [south, north] = spanOf(numbersOf(dec));
  const isDegrees = conversionTo("deg", unit)?.factor === 1;
  const isDoubtful = isDegrees && ras.length >= LEAST_ROWS_FOR_DOUBT && north - south > WIDE_DEGREES;
  if (unit !== "" && !isDoubtful) return [];
  const mayBeRadians = most <= 2 * Math.PI && Math.max(Math.abs(south), Math.abs(north)) <= RIGHT_ANGLE;
  return [
    ask(
      "ra-unit",
      `RA ${unit === "" ? "has no unit" : `is said to be in ${unit}`}. All values looked at lie between ${said(least)} and ${said(most)}, below 24, while Dec spans ${degrees(south)} to ${degrees(north)}. Read as degrees, every star would lie in one strip of the sky.`,
      "Say whether they are hours or degrees.",
      {
        column: header,
        count: ras.length,
        answers: [
          { value: "hour", label: "Hours" },
          { value: "deg", label: "Degrees" },
          ...(mayBeRadians ? [{ value: "unit:rad", label: "Radians" }] : []),
        ],
      },
    ),
  ];
};
