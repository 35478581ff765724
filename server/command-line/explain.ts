import { type Working, type Workings, workingsQuery } from "#shared/api/workings.ts";
import { type Column, columnsOf } from "#shared/catalogue/columns.ts";
import { recipeLabel } from "#shared/format/recipe-label.ts";
import { workingsText } from "#shared/format/workings-text.ts";
import { GIVEN } from "../catalogue/adopt.ts";
import { normaliseDesignation } from "../catalogue/designation.ts";
import type { Value } from "../database/bulk.ts";
import { GIVEN_KEYS } from "../derive/star-columns.ts";
import { drawStar } from "../workings/draws.ts";
import { explain as explainQuantity, type Subject } from "../workings/explain.ts";
import { Nearest } from "./nearest.ts";
import { needed, oneOperand, readOptions } from "./options.ts";
import { type Named, readCampaign, readCard, readRecipe } from "./settings-files.ts";
import { readStars, type StarRows } from "./stars.ts";
import { type Surroundings, write } from "./surroundings.ts";
import { asks, usage } from "./trouble.ts";

export const EXPLAIN_HELP = `Shows how numbers of one star come about, so that they can be worked out again by hand.

  shortlight explain FILE --star ID --quantity KEY [--quantity KEY ...]
                     [--card CARD --campaign CAMPAIGN] [--recipe RECIPE]
                     [--plan PLAN.json] [--draws N --seed S] [--json]

  FILE        the extract, as for \`shortlight derive\`
  --star      designation or identifier of the star, as the file has it
  --quantity  key of a derived column, such as radius, hz_inner, earth_period or r_min; several may be named
  --card      instrument card; needed, with the campaign, for noise_1h, transits and r_min
  --campaign  campaign
  --recipe    default, practice, or a JSON file {"name", "settings"}
  --plan      answers to what the file cannot say; \`shortlight derive --help\` describes it
  --draws     draws everything that has an error, 100 to 20 000 times, and gives 16, 50 and 84 %
  --seed      a whole number from 1; the same seed gives the same digits. Without it: 1
  --json      the same as JSON, one object for each quantity in a list: every step with its formula,
              inputs, constants, ranges, parts of the error and source

The quantity comes first and after it every step that it rests on, each once, down to what the file gives.
`;

const OPTIONS = {
  star: { type: "string" },
  quantity: { type: "string", multiple: true },
  card: { type: "string" },
  campaign: { type: "string" },
  recipe: { type: "string", default: "default" },
  plan: { type: "string" },
  draws: { type: "string" },
  seed: { type: "string" },
  json: { type: "boolean", default: false },
} as const;

const [DESIGNATION, SOURCE] = [GIVEN.indexOf("designation"), GIVEN.indexOf("source_id")];

const namesOf = (row: readonly Value[]): string[] =>
  [row[DESIGNATION], row[SOURCE]].filter((name) => typeof name === "string");

/** The first star of that name. Ends with the nearest spellings where there is none. */
const findStar = async (stars: StarRows, id: string): Promise<readonly Value[]> => {
  const wanted = normaliseDesignation(id);
  const nearest = new Nearest(id, normaliseDesignation);
  for await (const rows of stars.blocks())
    for (const row of rows)
      for (const name of namesOf(row)) {
        if (normaliseDesignation(name) === wanted) return row;
        nearest.show(name);
      }
  const { texts } = nearest;
  throw asks("no-such-star", `No star of the file is called “${id}”.`, {
    hint: texts.length > 0 ? `The nearest spellings are ${texts.join(", ")}.` : "The file names no star.",
  });
};

const givenOf = (row: readonly Value[]): Record<string, number> =>
  Object.fromEntries(
    GIVEN_KEYS.flatMap((key) => {
      const value = row[GIVEN.indexOf(key)];
      return typeof value === "number" ? [[key, value]] : [];
    }),
  );

const isOf = (stage: Column["stage"], key: string): boolean => columnsOf(stage).some((c) => c.key === key);

const refuseQuantity = (key: string, isSeen: boolean): never => {
  if (isOf("instrument", key) && !isSeen)
    throw usage(
      `${key} is what an instrument sees in a campaign, and neither is named.`,
      "Name them with --card and --campaign.",
    );
  if (isOf("given", key))
    throw usage(`${key} is given by the file: there is nothing to work out.`, "Look at its row.");
  const keys = columnsOf("stellar", "instrument")
    .map((c) => c.key)
    .filter((known) => known !== "flags");
  const nearest = new Nearest(key, (text) => text);
  for (const known of keys) nearest.show(known);
  throw usage(
    `There are no workings of a quantity “${key}”.`,
    `The nearest keys are ${nearest.texts.join(", ")}; all are ${keys.join(", ")}.`,
  );
};

const both = async <A, B>(
  first: Promise<Named<A>> | undefined,
  second: Promise<Named<B>> | undefined,
): Promise<readonly [Named<A>, Named<B>] | null> => {
  if (first && second) return [await first, await second];
  if (!first && !second) return null;
  await Promise.all([first, second]);
  throw usage("Only one of card and campaign is named.", "Name both, or neither.");
};

/** How often to draw and from which seed; null where nobody asks for draws. */
const drawsOf = (
  draws: string | undefined,
  seed: string | undefined,
): { draws: number; seed: number } | null => {
  if (draws === undefined) {
    if (seed !== undefined) throw usage("A seed is named, but no draws.", "Add --draws 1000.");
    return null;
  }
  const asked = workingsQuery.pick({ draws: true, seed: true }).safeParse({ draws, seed });
  if (!asked.success || asked.data.draws === undefined)
    throw usage(
      "--draws takes a whole number from 100 to 20 000, and --seed one from 1.",
      "Write for example --draws 1000 --seed 1.",
    );
  return { draws: asked.data.draws, seed: asked.data.seed };
};

const stepsOf = (subject: Subject, key: string): Working[] => {
  const steps = explainQuantity(subject, key);
  return steps.length > 0 ? steps : refuseQuantity(key, subject.card !== null);
};

export const explain = async (args: readonly string[], at: Surroundings): Promise<void> => {
  const { values, positionals } = readOptions(args, OPTIONS, "explain");
  const file = oneOperand(positionals, "The file to read", "explain");
  const id = needed(values.star, "star", "explain");
  const keys = [needed(values.quantity?.[0], "quantity", "explain"), ...(values.quantity ?? []).slice(1)];
  const asked = drawsOf(values.draws, values.seed);
  const seen = await both(
    values.card === undefined ? undefined : readCard(at.folder, values.card),
    values.campaign === undefined ? undefined : readCampaign(at.folder, values.campaign),
  );
  const recipe = await readRecipe(at.folder, values.recipe);
  const [card, campaign] = seen ?? [null, null];
  const row = await findStar(await readStars(at.folder, file, values.plan), id);
  const subject: Subject = {
    given: givenOf(row),
    recipe: recipe.settings,
    card: card?.settings ?? null,
    campaign: campaign?.settings ?? null,
  };
  const drawn = asked && {
    ...asked,
    intervals: drawStar(subject.given, subject.recipe, { ...subject, ...asked }),
  };
  const all = keys.map(
    (key): Workings => ({
      star: namesOf(row)[0] ?? id,
      recipe: recipeLabel(recipe),
      card: card?.name ?? null,
      campaign: campaign?.name ?? null,
      steps: stepsOf(subject, key),
      drawn,
    }),
  );
  await write(at.out, values.json ? `${JSON.stringify(all, null, 2)}\n` : all.map(workingsText).join("\n"));
};
