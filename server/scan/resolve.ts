import type { Term } from "#shared/api/merits.ts";
import type { ViewSpec } from "#shared/catalogue/view.ts";
import { LIMITS } from "#shared/limits.ts";
import { compileMerit, type ScoringTerm } from "#shared/merit/score.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import { CampaignVersion } from "../database/entities/campaign.entity.ts";
import { CatalogueEdition } from "../database/entities/catalogue-edition.entity.ts";
import { InstrumentCardVersion } from "../database/entities/instrument-card.entity.ts";
import { MeritVersion } from "../database/entities/merit.entity.ts";
import { Programme } from "../database/entities/programme.entity.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { type RecipeInUse, recipeInUse } from "../recipes/queries.ts";
import { canSortBy } from "./compile.ts";

interface Named {
  versionId: string;
  name: string;
  number: number;
}

/** A view with everything it names looked up; what cannot be had stands in `ignored`, and the rest holds. */
export interface ResolvedView {
  programmeId: string;
  /** 0 while there is no catalogue. */
  edition: number;
  recipe: RecipeInUse;
  card: (Named & { settings: CardSettings }) | null;
  campaign: (Named & { settings: CampaignSettings }) | null;
  merit: (Named & { terms: readonly ScoringTerm[] }) | null;
  view: ViewSpec;
  ignored: string[];
}

const named = (v: { id: string; name: string; number: number }): Named => ({
  versionId: v.id,
  name: v.name,
  number: v.number,
});

const findMerit = async (
  deps: Deps,
  programmeId: string,
  id: string | null,
): Promise<ResolvedView["merit"]> => {
  const merit = id === null ? null : await deps.db.manager.findOneBy(MeritVersion, { id, programmeId });
  if (!merit) return null;
  const compiled = compileMerit(merit.terms as Term[]);
  return compiled.ok ? { ...named(merit), terms: compiled.terms } : null;
};

const findCard = async (
  deps: Deps,
  programmeId: string,
  id: string | null,
): Promise<ResolvedView["card"]> => {
  const card =
    id === null ? null : await deps.db.manager.findOneBy(InstrumentCardVersion, { id, programmeId });
  return card && { ...named(card), settings: card.settings as CardSettings };
};

const findCampaign = async (
  deps: Deps,
  programmeId: string,
  id: string | null,
): Promise<ResolvedView["campaign"]> => {
  const campaign = id === null ? null : await deps.db.manager.findOneBy(CampaignVersion, { id, programmeId });
  return campaign && { ...named(campaign), settings: campaign.settings as CampaignSettings };
};

/** Looks up what the view names; ids of other programmes count as missing. */
export const resolveView = async (deps: Deps, programmeId: string, view: ViewSpec): Promise<ResolvedView> => {
  const programme = await deps.db.manager.findOneBy(Programme, { id: programmeId });
  if (!programme) throw notFound("This programme");
  const ignored: string[] = [];
  const isKnown = view.edition !== null && view.edition >= 1 && view.edition <= programme.edition;
  if (view.edition !== null && !isKnown) ignored.push("edition");
  const edition = isKnown && view.edition !== null ? view.edition : programme.edition;
  const made = await deps.db.manager.findOneBy(CatalogueEdition, { programmeId, number: edition });
  const [recipe, card, campaign, merit] = await Promise.all([
    recipeInUse(deps.db.manager, programmeId, made?.recipeVersionId ?? programme.recipeVersionId),
    findCard(deps, programmeId, view.card),
    findCampaign(deps, programmeId, view.campaign),
    findMerit(deps, programmeId, view.merit),
  ]);
  if (view.card !== null && !card) ignored.push("card");
  if (view.campaign !== null && !campaign) ignored.push("campaign");
  if (view.merit !== null && !merit) ignored.push("merit");
  const hasSort = canSortBy(view.sort.key, merit !== null);
  if (!hasSort) ignored.push("sort");
  if (view.cuts.length > LIMITS.cuts) ignored.push(`cuts after the first ${LIMITS.cuts}`);
  return {
    programmeId,
    edition,
    recipe,
    card,
    campaign,
    merit,
    view: {
      ...view,
      cuts: view.cuts.slice(0, LIMITS.cuts),
      sort: hasSort ? view.sort : { key: "designation", direction: "asc" },
    },
    ignored,
  };
};
