import type { OpenView } from "#server/scan/view.ts";
import type { Workings } from "#shared/api/workings.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import type { Deps } from "../deps.ts";
import { notFound } from "../errors.ts";
import { findGiven } from "../stars/queries.ts";
import { isStarId } from "../stars/service.ts";
import { drawStar } from "./draws.ts";
import { explain, type Subject } from "./explain.ts";

interface Asked {
  readonly key: string;
  /** How many draws; undefined for none. */
  readonly draws?: number | undefined;
  readonly seed: number;
}

const versionWords = (version: { name: string; number: number } | null): string | null =>
  version && `${version.name} v${version.number}`;

const drawnOf = (subject: Subject, { draws, seed }: Asked): Workings["drawn"] =>
  draws === undefined
    ? null
    : { draws, seed, intervals: drawStar(subject.given, subject.recipe, { ...subject, draws, seed }) };

/** How a quantity of one star came about, and on demand its interval by draws. */
export const readWorkings = async (
  deps: Deps,
  view: OpenView,
  starId: string,
  asked: Asked,
): Promise<Workings> => {
  const { recipe, card, campaign } = view.resolved;
  const found = isStarId(starId) ? await findGiven(deps.db.manager, view.resolved, starId) : null;
  if (!found) throw notFound("This star");
  const subject: Subject = {
    given: found.given,
    recipe: recipe.settings,
    card: card?.settings ?? null,
    campaign: campaign?.settings ?? null,
  };
  const steps = explain(subject, asked.key);
  if (steps.length === 0) throw notFound("This quantity");
  return {
    star: found.designation,
    recipe: recipeLabel(recipe),
    card: versionWords(card),
    campaign: versionWords(campaign),
    steps,
    drawn: drawnOf(subject, asked),
  };
};
