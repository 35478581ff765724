import type { Working, WorkingInput } from "#shared/api/workings.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import type { AssessedStar, Assessment } from "./assess.ts";

/** What an explanation of an instrument's quantity starts from. */
export interface Seen {
  readonly star: AssessedStar;
  readonly assessment: Assessment;
  readonly card: CardSettings;
  readonly campaign: CampaignSettings;
  readonly recipe: RecipeSettings;
}

/** A step towards an instrument's quantity: formula, and what enters it. */
export interface SeenStep {
  readonly key: string;
  readonly symbol: string;
  readonly label: string;
  readonly unit: string;
  readonly value: number;
  readonly formula: string;
  readonly inputs: readonly WorkingInput[];
  readonly constants?: Working["constants"];
  readonly reference: string;
}

export const input = (
  origin: WorkingInput["origin"],
  symbol: string,
  name: string,
  unit: string,
  value: number,
  step: string | null = null,
): WorkingInput => ({
  symbol,
  name,
  unit,
  value: Number.isNaN(value) ? null : value,
  error: null,
  origin,
  step,
});

export const ofCard = (symbol: string, name: string, unit: string, value: number): WorkingInput =>
  input("instrument", symbol, name, unit, value);

export const derived = (step: SeenStep): WorkingInput =>
  input("derived", step.symbol, step.label, step.unit, step.value, step.key);
