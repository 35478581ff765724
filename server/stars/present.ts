import { REACH_ERROR_KEY } from "#server/derive/star-columns.ts";
import { createAssessor } from "#server/scan/instrument.ts";
import type { ResolvedView } from "#server/scan/resolve.ts";
import type { StarRow } from "#shared/api/stars.ts";
import { blankCode } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, type Column, columnsOf, errorKey, isNumeric } from "#shared/catalogue/columns.ts";
import { scoreStar } from "#shared/merit/score.ts";
import type { StoredEntry, StoredStar } from "./queries.ts";

const GIVEN = columnsOf("given").filter((c) => isNumeric(c));
const STELLAR = columnsOf("stellar");

interface Cells {
  values: Record<string, number>;
  blanks: Record<string, number>;
}

const isNumber = (value: unknown): value is number => typeof value === "number" && Number.isFinite(value);

const put = (cells: Cells, key: string, value: unknown, reason: number): void => {
  if (isNumber(value)) cells.values[key] = value;
  else cells.blanks[key] = reason;
};

const putError = (cells: Cells, key: string, value: unknown): void => {
  if (isNumber(value)) cells.values[errorKey(key)] = value;
};

const storedCells = (row: Record<string, unknown>, columns: readonly Column[], cells: Cells): void => {
  for (const { key, stage, hasError } of columns) {
    const reason = stage === "stellar" ? Number(row[blankKey(key)] ?? 0) : 0;
    put(cells, key, row[key], reason || blankCode("not-given"));
    if (hasError) putError(cells, key, row[errorKey(key)]);
  }
};

/** The instrument's own quantities, where one is chosen. */
const assessedCells = (
  assess: ReturnType<typeof createAssessor>,
  hasCampaign: boolean,
  row: StoredStar,
  cells: Cells,
): void => {
  const a = assess((key) => {
    // The error of the reach is stored with the star, but it is no column that is shown.
    const stored = key === REACH_ERROR_KEY ? row[key] : cells.values[key];
    return isNumber(stored) ? stored : Number.NaN;
  });
  put(cells, "noise_1h", a.noise1h, a.noiseBlank);
  if (!hasCampaign) return;
  put(cells, "transits", a.transits, a.transitsBlank);
  put(cells, "r_min", a.rMin, a.rMinBlank);
  putError(cells, "r_min", a.rMinError);
};

/** Makes rows of the table: values, reasons of blanks, the instrument's quantities, the merit and its shares. */
export const rowPresenter = (resolved: ResolvedView): ((row: StoredStar) => Omit<StarRow, "place">) => {
  const { card, campaign, recipe, merit } = resolved;
  const assess =
    card &&
    createAssessor({ recipe: recipe.settings, card: card.settings, campaign: campaign?.settings ?? null });
  return (row) => {
    const cells: Cells = { values: {}, blanks: {} };
    storedCells(row, GIVEN, cells);
    storedCells(row, STELLAR, cells);
    if (assess) assessedCells(assess, campaign !== null, row, cells);
    const score = merit && scoreStar(merit.terms, (key) => cells.values[key] ?? Number.NaN);
    return {
      id: String(row.star_id),
      designation: row.designation,
      sourceId: row.source_id,
      release: row.release,
      ...cells,
      flagBits: row.flags_bits,
      merit: score?.merit ?? null,
      shares: score?.shares ?? [],
    };
  };
};

const ENTRY_KEYS = [
  ...GIVEN.flatMap((c) => [c.key, errorKey(c.key)]),
  "teff_given",
  "teff_given_err",
  "distance_given",
  "distance_given_err",
];

export const presentEntry = (entry: StoredEntry) => ({
  extractId: String(entry.extract_id),
  extractNumber: entry.extract_number,
  extractName: entry.extract_name,
  rowNumber: entry.row_number,
  designation: entry.designation ?? "",
  sourceId: entry.source_id,
  release: entry.release,
  values: Object.fromEntries(
    ENTRY_KEYS.flatMap((key): [string, number][] => {
      const value = entry[key];
      // What extracts give as a temperature or distance is the given value of the column of that name.
      return isNumber(value) ? [[key.replace("_given", ""), value]] : [];
    }),
  ),
});
