import { existsSync, readdirSync } from "node:fs";
import { basename, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { z } from "zod";
import { name, note } from "#shared/api/common.ts";
import { campaignBody, cardBody } from "#shared/api/instruments.ts";
import { recipeSettings } from "#shared/api/recipes.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import {
  DEFAULT_RECIPE,
  PRACTICE_RECIPE,
  type Recipe,
  type RecipeSettings,
} from "#shared/science/recipes.ts";
import { contentHash } from "../recipes/content-hash.ts";
import { readJsonFile } from "./json-file.ts";
import { usage } from "./trouble.ts";

/** Settings with the name that files and messages give them. */
export interface Named<T> {
  readonly name: string;
  readonly settings: T;
}

export interface NamedRecipe extends Named<RecipeSettings> {
  /** Of its version, from 1. */
  readonly number: number;
  /** Of the settings, the same on any machine. */
  readonly hash: string;
}

const DEMO = fileURLToPath(new URL("../../data-demo/", import.meta.url));

/** The settings that come with the product and can be called by name. */
const demoNames = (): string[] =>
  readdirSync(DEMO)
    .filter((file) => file.endsWith(".json"))
    .map((file) => basename(file, ".json"))
    .sort();

/** A file where there is one, else the one of that name which comes with the product. */
const locate = (folder: string, given: string, option: string): string => {
  const file = resolve(folder, given);
  if (existsSync(file)) return file;
  if (demoNames().includes(given)) return join(DEMO, `${given}.json`);
  throw usage(
    `--${option} names “${given}”, which is neither a file nor the name of settings that come along.`,
    `Check the path, or take one of ${demoNames().join(", ")}.`,
  );
};

export const readCard = async (folder: string, given: string): Promise<Named<CardSettings>> => {
  const file = locate(folder, given, "card");
  const schema = cardBody.partial({ name: true, source: true });
  const card = await readJsonFile(folder, file, "The card", schema);
  return { name: card.name ?? basename(file, ".json"), settings: card.settings };
};

export const readCampaign = async (folder: string, given: string): Promise<Named<CampaignSettings>> => {
  const file = locate(folder, given, "campaign");
  const schema = campaignBody.partial({ name: true });
  const campaign = await readJsonFile(folder, file, "The campaign", schema);
  return { name: campaign.name ?? basename(file, ".json"), settings: campaign.settings };
};

const SHIPPED: ReadonlyMap<string, Recipe> = new Map([
  ["default", DEFAULT_RECIPE],
  ["practice", PRACTICE_RECIPE],
]);

/** A recipe as a file keeps it; a number tells its version where it has been saved before. */
const recipeFile = z.strictObject({
  name,
  note: note.optional(),
  number: z.int().positive().optional(),
  settings: recipeSettings,
});

const named = (recipe: Pick<Recipe, "name" | "settings">, number: number): NamedRecipe => ({
  name: recipe.name,
  number,
  hash: contentHash(recipe.settings),
  settings: recipe.settings,
});

/** A recipe that comes with the product, by its name, or one from a file. */
export const readRecipe = async (folder: string, given: string): Promise<NamedRecipe> => {
  const shipped = SHIPPED.get(given);
  if (shipped) return named(shipped, 1);
  if (!existsSync(resolve(folder, given)))
    throw usage(
      `--recipe names “${given}”, which is neither a file nor a recipe that comes along.`,
      `Check the path, or take one of ${[...SHIPPED.keys()].join(", ")}.`,
    );
  const file = await readJsonFile(folder, given, "The recipe", recipeFile);
  return named(file, file.number ?? 1);
};
