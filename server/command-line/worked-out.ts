import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { assessColumns, type InstrumentColumns } from "../assess/columns.ts";
import { givenColumns } from "../catalogue/given-columns.ts";
import type { Value } from "../database/bulk.ts";
import { deriveColumns } from "../derive/derive.ts";
import type { StellarColumns } from "../derive/star-columns.ts";

export interface Settings {
  readonly card: CardSettings;
  readonly campaign: CampaignSettings;
  readonly recipe: RecipeSettings;
}

/** A block of stars with all that is known and worked out about them. */
export interface WorkedOut {
  /** Values as given, each row in the order of `GIVEN`. */
  readonly rows: readonly (readonly Value[])[];
  readonly stellar: StellarColumns;
  readonly instrument: InstrumentColumns;
}

/** Derives and assesses a block. Pure: the same rows and settings give the same bits. */
export const workOut = (rows: readonly (readonly Value[])[], settings: Settings): WorkedOut => {
  const given = givenColumns(rows, settings.recipe);
  const stellar = deriveColumns(given, rows.length, settings.recipe);
  const instrument = assessColumns(
    { ...given, ...stellar.values },
    rows.length,
    settings.card,
    settings.campaign,
    settings.recipe,
  );
  return { rows, stellar, instrument };
};
