import { z } from "zod";
import { name, note } from "#shared/api/common.ts";
import { recipeSettings } from "#shared/api/recipes.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { valueAt } from "./recipe-differences.ts";
import {
  aboutSetting,
  CHOICES,
  type ChoiceKey,
  FIGURES,
  type FigureKey,
  GROUPS,
  isFigure,
  isOrder,
  ON_OFF,
  ORDERS,
  type OrderKey,
  type SettingKey,
} from "./recipe-settings.ts";

/** A limit of one release while it is typed. */
export interface ReleaseDraft {
  /** For the screen alone: rows are told apart while others go. */
  readonly key: string;
  release: string;
  limit: string;
}

/** A recipe while it is typed: every number is still text. */
export type RecipeDraft = { name: string; note: string; releases: readonly ReleaseDraft[] } & Record<
  FigureKey | ChoiceKey,
  string
> &
  Record<OrderKey, readonly string[]>;

/** What numbers start from that do not apply to the recipe that is edited. */
const FIRST: Readonly<Partial<Record<SettingKey, string>>> = {
  ebv: "0.1",
  ebvPerKpc: "0.5",
  e: "0.1",
  alpha: "0.867",
  beta: "3.03",
};

const keysOf = <Table extends object>(table: Table) => Object.keys(table) as (keyof Table & SettingKey)[];

const asText = (value: unknown): string =>
  typeof value === "boolean" ? (value ? ON_OFF.on : ON_OFF.off) : String(value);

/** A number on its way out of the form and in again: a true minus is read as one. */
export const draftOfRecipe = (recipe: {
  readonly name: string;
  readonly note: string;
  readonly settings: RecipeSettings;
}): RecipeDraft => {
  const { settings } = recipe;
  const texts = [...keysOf(FIGURES), ...keysOf(CHOICES)].map((key) => {
    const value = valueAt(settings, aboutSetting(key).path);
    return [key, value === undefined ? (FIRST[key] ?? "") : asText(value)] as const;
  });
  const orders = keysOf(ORDERS).map((key) => [key, valueAt(settings, ORDERS[key].path)] as const);
  return {
    ...(Object.fromEntries(texts) as Record<FigureKey | ChoiceKey, string>),
    ...(Object.fromEntries(orders) as Record<OrderKey, readonly string[]>),
    name: recipe.name,
    note: recipe.note,
    releases: settings.astrometricQuality.byRelease.map(({ release, limit }) => ({
      key: crypto.randomUUID(),
      release,
      limit: String(limit),
    })),
  };
};

/** Whether a setting applies to what the draft says now. */
export const applies = (draft: RecipeDraft, key: SettingKey): boolean => {
  const { when } = aboutSetting(key);
  return when === undefined || draft[when.choice] === when.is;
};

/** A figure as typed: spaces between thousands count for nothing, a true minus is one. NaN where it is none. */
const readFigure = (text: string): number => {
  const plain = text.replace(/[\s\u2009\u202f]/g, "").replace(/\u2212/g, "-");
  return plain === "" ? Number.NaN : Number(plain);
};

const whyNoFigure = (text: string): string | null => {
  if (Number.isFinite(readFigure(text))) return null;
  if (text.trim() === "") return "It is blank. Enter a number.";
  if (/^[-−]?[\d\s]+,\d+$/.test(text.trim()))
    return `“${text}”: use a point for decimals here (${text.replace(",", ".")}).`;
  return `“${text}” is not a number. Enter it in figures.`;
};

const inputOf = (draft: RecipeDraft, key: SettingKey): unknown => {
  if (key === "releases")
    return draft.releases.map(({ release, limit }) => ({ release, limit: readFigure(limit) }));
  if (isFigure(key)) return readFigure(draft[key]);
  if (isOrder(key)) return draft[key];
  return key === "usesFeh" ? draft[key] === ON_OFF.on : draft[key];
};

const KEYS: readonly SettingKey[] = GROUPS.flatMap(({ keys }) => keys);

/** The settings as the draft has them, of any shape: the contract says what is wrong with them. */
const settingsOf = (draft: RecipeDraft): Record<string, unknown> => {
  const settings: Record<string, unknown> = {};
  for (const key of KEYS.filter((each) => applies(draft, each))) {
    const names = aboutSetting(key).path.split(".");
    const last = names.pop() ?? "";
    let place = settings;
    for (const each of names) {
      const inner = (place[each] ?? {}) as Record<string, unknown>;
      place[each] = inner;
      place = inner;
    }
    place[last] = inputOf(draft, key);
  }
  return settings;
};

/** Name of the field that a path in the settings belongs to. */
const fieldAt = (path: string): string => {
  const key = KEYS.find((each) => {
    const own = aboutSetting(each).path;
    return path === own || path.startsWith(`${own}.`);
  });
  if (key === "releases") return path.replace(aboutSetting(key).path, key);
  return key ?? path;
};

/** Texts that are no numbers, by field. */
const unreadFigures = (draft: RecipeDraft): Map<string, string> => {
  const texts = [
    ...keysOf(FIGURES).flatMap((key) => (applies(draft, key) ? [[key as string, draft[key]] as const] : [])),
    ...draft.releases.map(({ limit }, i) => [`releases.${i}.limit`, limit] as const),
  ];
  return new Map(
    texts.flatMap(([field, text]) => {
      const why = whyNoFigure(text);
      return why === null ? [] : [[field, why] as const];
    }),
  );
};

const about = z.object({ name, note });

/** Reads a draft into what is sent; each refusal stands beside its field, by the field's name. */
export const recipeDraftSchema = z
  .custom<RecipeDraft>()
  .transform((draft, context): { name: string; note: string; settings: RecipeSettings } => {
    const wrong = unreadFigures(draft);
    const named = about.safeParse(draft);
    const read = recipeSettings.safeParse(settingsOf(draft));
    for (const { path, message } of named.error?.issues ?? []) wrong.set(path.join("."), message);
    for (const { path, message } of read.error?.issues ?? []) {
      const field = fieldAt(path.join("."));
      if (!wrong.has(field)) wrong.set(field, message);
    }
    if (named.success && read.success && wrong.size === 0) return { ...named.data, settings: read.data };
    for (const [field, message] of wrong)
      context.addIssue({ code: "custom", path: field.split("."), message, input: draft });
    return z.NEVER;
  });

/** What is wrong with the fields that are not as they were when the form was opened. */
export const wrongAmongChanged = (draft: RecipeDraft, opened: RecipeDraft): Record<string, string> => {
  const parsed = recipeDraftSchema.safeParse(draft);
  const isChanged = (field: PropertyKey | undefined): boolean =>
    field !== undefined && draft[field as keyof RecipeDraft] !== opened[field as keyof RecipeDraft];
  return Object.fromEntries(
    (parsed.error?.issues ?? [])
      .filter(({ path }) => isChanged(path[0]))
      .map(({ path, message }) => [path.join("."), message]),
  );
};
