import { CampaignVersion } from "#server/database/entities/campaign.entity.ts";
import { CatalogueEdition } from "#server/database/entities/catalogue-edition.entity.ts";
import { InstrumentCardVersion } from "#server/database/entities/instrument-card.entity.ts";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import type { Deps } from "#server/deps.ts";
import { deriveColumns } from "#server/derive/derive.ts";
import { allocateGiven } from "#server/derive/star-columns.ts";
import { recipeInUse } from "#server/recipes/queries.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";

/** A star as an extract would give it: a designation, perhaps an identifier, and numbers by column. */
export interface GivenStar {
  designation: string;
  sourceId?: string;
  values: Record<string, number>;
}

/** Practice stars A, B and C of the product's Appendix A. */
export const PRACTICE_STARS: GivenStar[] = [
  {
    designation: "Practice A",
    sourceId: "3141592653589793239",
    values: {
      ks_mag: 7.912,
      parallax: 60,
      parallax_err: 0.05,
      teff_given: 3350,
      card_mag: 10.2,
      light_share: 1,
    },
  },
  {
    designation: "Practice B",
    sourceId: "1234567890123456789",
    values: {
      ks_mag: 9.431,
      parallax: 81.3,
      parallax_err: 0.05,
      teff_given: 2950,
      card_mag: 12.4,
      light_share: 1,
    },
  },
  {
    designation: "Practice C",
    sourceId: "6917529027641081857",
    values: {
      ks_mag: 6.85,
      parallax: 38.5,
      parallax_err: 0.05,
      teff_given: 3650,
      card_mag: 9.1,
      light_share: 1,
    },
  },
];

const starRow = (stars: readonly GivenStar[], recipe: RecipeSettings) => {
  const given = allocateGiven(stars.length);
  stars.forEach(({ values }, i) => {
    for (const [key, value] of Object.entries(values)) {
      const column = given[key];
      if (!column) throw new RangeError(`No given column ${key}.`);
      column[i] = value;
    }
  });
  const stellar = deriveColumns(given, stars.length, recipe);
  const all = { ...given, ...stellar.values, ...stellar.blanks, ...stellar.methods };
  return (i: number): Record<string, unknown> => ({
    ...Object.fromEntries(
      Object.entries(all).map(([key, column]) => [key, Number.isNaN(column[i]) ? null : column[i]]),
    ),
    flags_bits: stellar.flagBits[i],
    flags: stellar.flags[i],
  });
};

/**
 * Makes an edition of a catalogue of those stars, derived by the programme's recipe, and puts it in force. Ids count
 * from `firstId`.
 */
export const buildSky = async (
  deps: Deps,
  programme: Programme,
  stars: readonly GivenStar[],
  firstId = 2n ** 32n + 1n,
): Promise<string[]> => {
  const number = programme.edition + 1;
  const { settings } = await recipeInUse(deps.db.manager, programme.id, programme.recipeVersionId);
  const cells = starRow(stars, settings);
  const ids = stars.map((_, i) => String(firstId + BigInt(i)));
  const rows = stars.map(({ designation, sourceId }, i) => ({
    programme_id: programme.id,
    star_id: ids[i],
    from_edition: number,
    designation,
    source_id: sourceId ?? null,
    release: sourceId ? "Invented 1" : null,
    ...cells(i),
  }));
  const names = Object.keys(rows[0] ?? {});
  for (let i = 0; i < rows.length; i += 500) {
    const values = rows.slice(i, i + 500).map((row) => names.map((name) => row[name as keyof typeof row]));
    await deps.db.query(`INSERT INTO star (${names.map((n) => `\`${n}\``).join(", ")}) VALUES ?`, [values]);
  }
  await deps.db.manager.insert(CatalogueEdition, {
    programmeId: programme.id,
    number,
    reason: "test",
    recipeVersionId: programme.recipeVersionId,
    stars: stars.length,
    fingerprint: "0".repeat(64),
    madeAt: new Date(),
    madeBy: null,
  });
  await deps.db.query("UPDATE programme SET edition = ? WHERE programme_id = ?", [number, programme.id]);
  programme.edition = number;
  return ids;
};

export const PRACTICE_30: CardSettings = {
  model: "formula",
  passband: "card_mag",
  referenceMagnitude: 10,
  photonPpm: 90,
  backgroundPpm: 12,
  floorPpm: 25,
  brightLimit: 7,
  faintLimit: 14.5,
};

export const PRACTICE_CAMPAIGN: CampaignSettings = {
  lengthDays: 180,
  duty: 0.9,
  leastTransits: 2,
  snrLimit: 7.1,
  statistic: "boxcar",
};

/** A version of a card and one of a campaign; answers their ids. */
export const buildInstrument = async (
  deps: Deps,
  programme: Programme,
  card: CardSettings = PRACTICE_30,
  campaign: CampaignSettings = PRACTICE_CAMPAIGN,
): Promise<{ card: string; campaign: string }> => {
  const common = { programmeId: programme.id, number: 1, savedBy: "1", savedAt: new Date() };
  const { manager } = deps.db;
  const madeCard = await manager.save(
    manager.create(InstrumentCardVersion, {
      ...common,
      name: "Practice 30",
      source: "Appendix A",
      settings: card,
    }),
  );
  const madeCampaign = await manager.save(
    manager.create(CampaignVersion, { ...common, name: "Half a year", settings: campaign }),
  );
  return { card: madeCard.id, campaign: madeCampaign.id };
};
