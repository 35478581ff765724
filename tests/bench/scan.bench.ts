import { CatalogueEdition } from "#server/database/entities/catalogue-edition.entity.ts";
import { Programme } from "#server/database/entities/programme.entity.ts";
import type { Deps } from "#server/deps.ts";
import { addShippedRecipes } from "#server/recipes/shipped.ts";
import { buildScanIndex } from "#server/scan/build.ts";
import { openView } from "#server/scan/view.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { type Bench, type Measurement, medianTime, timed } from "./harness.ts";

const ROUNDS = 7;
const WINDOW = 100;

/** A catalogue of evenly spread figures, made by the database itself. */
const fillCatalogue = async (deps: Deps, rows: number): Promise<Programme> => {
  const { manager } = deps.db;
  const madeAt = new Date();
  const programme = await manager.save(
    manager.create(Programme, {
      name: "Bench",
      edition: 1,
      isInvented: true,
      createdAt: madeAt,
    }),
  );
  const recipes = await addShippedRecipes(manager, programme.id, madeAt);
  await manager.insert(CatalogueEdition, {
    programmeId: programme.id,
    number: 1,
    reason: "bench",
    recipeVersionId: recipes.default,
    stars: rows,
    fingerprint: "0".repeat(64),
    madeAt,
    madeBy: null,
  });
  await deps.db.query(
    `INSERT INTO star (programme_id, star_id, from_edition, designation, parallax, ks_mag, ruwe, teff, radius)
     SELECT ?, seq, 1, CONCAT('B-', seq), 2 + 58 * RAND(seq), 6 + 8 * RAND(seq + 1e7), 0.9 + RAND(seq + 2e7),
            2600 + 3400 * RAND(seq + 3e7), 0.1 + 0.9 * RAND(seq + 4e7)
     FROM seq_1_to_${rows}`,
    [programme.id],
  );
  return programme;
};

/** Another threshold each round, so that nothing remembered answers. */
const viewOf = (round: number): ViewSpec => ({
  edition: null,
  card: null,
  campaign: null,
  merit: null,
  cuts: [
    { label: "", blanks: "drop", expression: `teff < ${5000 + round}` },
    { label: "", blanks: "drop", expression: "ruwe < 1.7" },
    { label: "", blanks: "drop", expression: "parallax > 8" },
    { label: "", blanks: "drop", expression: "radius < 0.9" },
  ],
  sort: { key: "radius", direction: "asc" },
});

const WHERE =
  "programme_id = ? AND to_edition IS NULL AND teff < ? AND ruwe < 1.7 AND parallax > 8 AND radius < 0.9";

const plainWindow = async (deps: Deps, programmeId: string, round: number, offset: number): Promise<void> => {
  const values = [programmeId, 5000 + round];
  await deps.db.query(`SELECT COUNT(*) FROM star WHERE ${WHERE}`, values);
  await deps.db.query(
    `SELECT star_id FROM star WHERE ${WHERE} ORDER BY radius, star_id LIMIT ${WINDOW} OFFSET ${offset}`,
    values,
  );
};

const window = async (deps: Deps, programmeId: string, round: number, offset: number): Promise<void> => {
  const view = await openView(deps, programmeId, viewOf(round));
  await view.count();
  await view.ids(offset, WINDOW);
};

const measure = async (deps: Deps, programmeId: string, rows: number): Promise<Measurement[]> => {
  const plain = { what: "the same question to MariaDB", value: Number.NaN };
  const middle = Math.floor(rows * 0.2);
  const n = rows.toLocaleString("en");
  const at = async (what: string, offset: number, shift: number): Promise<Measurement> => ({
    what,
    value: await medianTime(ROUNDS, (round) => window(deps, programmeId, round + shift, offset)),
    unit: "ms",
    plain: {
      ...plain,
      value: await medianTime(ROUNDS, (round) => plainWindow(deps, programmeId, round + shift, offset)),
    },
  });
  const first = await at(`four new cuts on ${n} stars, count and first ${WINDOW}`, 0, 0);
  const later = await at(`the same, ${WINDOW} from place ${middle.toLocaleString("en")} on`, middle, 100);
  // The first look at a view lays its order down; scrolling on reads from it.
  await window(deps, programmeId, 500, middle);
  const scrolled: Measurement = {
    what: `a later window of a view that is open (${n} stars)`,
    value: await medianTime(ROUNDS, (round) => window(deps, programmeId, 500, middle + (round + 2) * WINDOW)),
    unit: "ms",
    plain: { ...plain, value: later.plain?.value ?? Number.NaN },
  };
  return [first, later, scrolled];
};

const bench: Bench = {
  name: "scan",
  rows: 100_000,
  run: async ({ rows, deps }) => {
    const programme = await fillCatalogue(deps, rows);
    const key = { programmeId: programme.id, edition: 1, cardVersionId: null, campaignVersionId: null };
    const built = await timed(() => buildScanIndex(deps, key));
    const read = await timed(() => deps.db.query("SELECT star_id, teff, radius, parallax, ruwe FROM star"));
    return [
      {
        what: `building the index of ${rows.toLocaleString("en")} stars, all columns`,
        value: built,
        unit: "ms",
        plain: { what: "reading five columns of them", value: read },
      },
      ...(await measure(deps, programme.id, rows)),
    ];
  },
};

export default bench;
