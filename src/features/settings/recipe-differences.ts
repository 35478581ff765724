import type { RecipeSettings } from "#shared/science/recipes.ts";
import {
  aboutSetting,
  CHOICES,
  FIGURES,
  figureWords,
  GROUPS,
  isChoice,
  isFigure,
  isOrder,
  ON_OFF,
  type Option,
  ORDERS,
  type SettingKey,
} from "./recipe-settings.ts";

/** What stands at a path like `distance.order`; undefined where the settings have no such part. */
export const valueAt = (settings: RecipeSettings, path: string): unknown =>
  path
    .split(".")
    .reduce<unknown>(
      (part, name) =>
        typeof part === "object" && part !== null ? (part as Record<string, unknown>)[name] : undefined,
      settings,
    );

const labelOf = (options: readonly Option[], value: unknown): string =>
  options.find((option) => option.value === value)?.label ?? String(value);

/** "1. Distance as given; 2. Inverse of the parallax"; one alone needs no number. */
const inOrder = (labels: readonly string[]): string =>
  labels.length === 1 ? labels.join() : labels.map((label, i) => `${i + 1}. ${label}`).join("; ");

const releaseWords = ({ astrometricQuality }: RecipeSettings): string =>
  astrometricQuality.byRelease.map(({ release, limit }) => `${release}: ${figureWords(limit)}`).join(", ") ||
  "none";

/** A setting's value in the reader's words; null where it does not apply. */
const wordsOf = (settings: RecipeSettings, key: SettingKey): string | null => {
  if (key === "releases") return releaseWords(settings);
  const value = valueAt(settings, aboutSetting(key).path);
  if (value === undefined) return null;
  if (isFigure(key)) return `${figureWords(Number(value))} ${FIGURES[key].unit}`.trim();
  if (isOrder(key) && Array.isArray(value))
    return inOrder(value.map((each) => labelOf(ORDERS[key].options, each)));
  if (typeof value === "boolean") return labelOf(CHOICES.usesFeh.options, value ? ON_OFF.on : ON_OFF.off);
  return isChoice(key) ? labelOf(CHOICES[key].options, value) : null;
};

export interface SettingLine {
  key: SettingKey;
  label: string;
  /** In the order of the recipes; null where it does not apply. */
  values: (string | null)[];
  isDifferent: boolean;
}

export interface LineGroup {
  title: string;
  lines: SettingLine[];
}

/** Every setting of the recipes side by side; what applies to none of them is left out. */
export const settingLines = (recipes: readonly { readonly settings: RecipeSettings }[]): LineGroup[] =>
  GROUPS.map(({ title, keys }) => ({
    title,
    lines: keys
      .map((key) => {
        const values = recipes.map(({ settings }) => wordsOf(settings, key));
        return { key, label: aboutSetting(key).label, values, isDifferent: new Set(values).size > 1 };
      })
      .filter(({ values }) => values.some((value) => value !== null)),
  }));

/** Only the settings in which the recipes differ. */
export const recipeDifferences = (recipes: readonly { readonly settings: RecipeSettings }[]): LineGroup[] =>
  settingLines(recipes)
    .map(({ title, lines }) => ({ title, lines: lines.filter(({ isDifferent }) => isDifferent) }))
    .filter(({ lines }) => lines.length > 0);
