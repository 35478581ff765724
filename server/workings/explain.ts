import { type AssessedStar, assessStar, newAssessment, reachErrorByNoise } from "#server/assess/assess.ts";
import type { Seen, SeenStep } from "#server/assess/seen.ts";
import { seenSteps } from "#server/assess/steps.ts";
import type { Definition, DefinitionOf } from "#server/derive/definition.ts";
import { columnsOfOne, deriveRow, scratchFor } from "#server/derive/derive.ts";
import { bindInputs } from "#server/derive/inputs.ts";
import { STELLAR_DEFINITIONS } from "#server/derive/quantities.ts";
import { SOURCE, type SourceName } from "#server/derive/relative-error.ts";
import type { Scratch } from "#server/derive/scratch.ts";
import { type RecordingSlots, recordingSlotsOf } from "#server/derive/slots.ts";
import { allocateStellar, type StellarColumns } from "#server/derive/star-columns.ts";
import { type FormulaSymbol, SYMBOLS, type SymbolKey } from "#server/derive/symbols.ts";
import { assessedStar } from "#server/scan/instrument.ts";
import type { Working, WorkingInput } from "#shared/api/workings.ts";
import { blankReason } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, errorKey, findColumn } from "#shared/catalogue/columns.ts";
import { METHODS, type MethodKey } from "#shared/catalogue/methods.ts";
import type { CampaignSettings, CardSettings } from "#shared/science/cards.ts";
import type { RecipeSettings } from "#shared/science/recipes.ts";
import { substitute } from "./substitute.ts";

/** What is explained: one star's given values, and by what they are derived and seen. */
export interface Subject {
  readonly given: Readonly<Record<string, number>>;
  readonly recipe: RecipeSettings;
  readonly card: CardSettings | null;
  readonly campaign: CampaignSettings | null;
}

/** One star derived with everything that the steps left behind. */
interface Derived {
  readonly star: Scratch;
  readonly recipe: RecipeSettings;
  readonly columns: StellarColumns;
  readonly slots: RecordingSlots;
}

const derive = ({ given, recipe }: Subject): Derived => {
  const columns = allocateStellar(1);
  const slots = recordingSlotsOf(columns);
  const star = scratchFor(recipe);
  deriveRow(star, bindInputs(columnsOfOne(given), 1), recipe, slots);
  return { star, recipe, columns, slots };
};

const orNull = (value: number | undefined): number | null =>
  value === undefined || !Number.isFinite(value) ? null : value;

const methodOf = ({ columns }: Derived, key: string): MethodKey | undefined => {
  // The colour has no method of its own: it is the one that gave the temperature.
  const code = columns.methods[`${key === "colour" ? "teff" : key}_method`]?.[0];
  return METHODS.find((method) => method.code === code)?.key;
};

const definitionOf = (derived: Derived, key: string): Definition | undefined => {
  const of: DefinitionOf | undefined = STELLAR_DEFINITIONS[key as keyof typeof STELLAR_DEFINITIONS];
  return of?.(derived.star, derived.recipe, methodOf(derived, key));
};

/** Words for the sources of error, in the order of their vector. */
const SOURCE_WORDS: Readonly<Record<SourceName, string>> = {
  parallax: "distance",
  g: "G magnitude",
  bp: "BP magnitude",
  rp: "RP magnitude",
  v: "V magnitude",
  j: "J magnitude",
  h: "H magnitude",
  ks: "Ks magnitude",
  temperature: "temperature: as given, or scatter of its relation",
  gravity: "log g",
  iron: "[Fe/H]",
  radius: "scatter of the radius relation",
  mass: "scatter of the mass relation",
  light: "scatter of the bolometric correction",
  extinction: "colour excess",
};

const errorPartsOf = (vector: Float64Array | null): Working["errorParts"] =>
  vector === null
    ? []
    : (Object.entries(SOURCE) as [SourceName, number][]).flatMap(([name, i]) => {
        const size = vector[i] ?? 0;
        return size === 0 ? [] : [{ source: SOURCE_WORDS[name], size: orNull(Math.abs(size)) }];
      });

const originOf = ({ star }: Derived, symbol: FormulaSymbol): Pick<WorkingInput, "origin" | "step"> => {
  const { origin } = symbol;
  if (origin.kind === "quantity") return { origin: "derived", step: origin.key };
  if (origin.kind === "given") return { origin: "given", step: null };
  if (origin.kind === "recipe") return { origin: "recipe", step: null };
  const isGiven = origin.key === "logg" ? star.hasLogg : star.hasFeh;
  return { origin: isGiven ? "given" : "assumed", step: null };
};

const errorOf = ({ star, columns }: Derived, symbol: FormulaSymbol): number | null => {
  const { origin, error } = symbol;
  if (origin.kind === "quantity") return orNull(columns.values[errorKey(origin.key)]?.[0]);
  return orNull(error?.(star));
};

const inputOf = (derived: Derived, key: SymbolKey): WorkingInput => {
  const symbol: FormulaSymbol = SYMBOLS[key];
  return {
    symbol: key,
    name: symbol.name,
    unit: symbol.unit,
    value: orNull(symbol.value(derived.star, derived.recipe)),
    error: errorOf(derived, symbol),
    ...originOf(derived, symbol),
  };
};

const rangesOf = ({ star, recipe }: Derived, definition: Definition): Working["ranges"] =>
  (definition.ranges?.(recipe) ?? []).map(({ symbol, from, to }) => {
    const value = SYMBOLS[symbol].value(star, recipe);
    return { symbol, from, to, value: orNull(value), holds: value >= from && value <= to };
  });

const numbersOf = (inputs: readonly WorkingInput[], constants: Working["constants"]): Map<string, number> =>
  new Map([
    ...inputs.flatMap(({ symbol, value }): [string, number][] => (value === null ? [] : [[symbol, value]])),
    ...constants.map(({ symbol, value }): [string, number] => [symbol, value]),
  ]);

/** The symbol under which formulas write a quantity; its key where none does. */
const symbolOf = (key: string): SymbolKey | undefined =>
  (Object.keys(SYMBOLS) as SymbolKey[]).find((symbol) => {
    const { origin }: FormulaSymbol = SYMBOLS[symbol];
    return origin.kind === "quantity" && origin.key === key;
  });

const wordsOf = (key: string): Pick<Working, "symbol" | "label" | "unit"> => {
  const column = findColumn(key);
  const symbol = symbolOf(key);
  const of: FormulaSymbol | undefined = symbol && SYMBOLS[symbol];
  return {
    symbol: symbol ?? key,
    label: column?.label ?? of?.name ?? key,
    unit: column?.unit ?? of?.unit ?? "",
  };
};

const NOTHING_COMPUTED = {
  formula: "",
  substituted: "",
  isRoot: false,
  inputs: [],
  constants: [],
  ranges: [],
  scatter: "",
  errorParts: [],
  reference: "",
} as const satisfies Partial<Working>;

const blankOf = (code: number | undefined): Working["blank"] => {
  if (!code) return null;
  const { word, sentence } = blankReason(code);
  return { word, sentence };
};

const numberOf = ({ star, recipe, columns }: Derived, key: string): number => {
  const stored = columns.values[key]?.[0];
  if (stored !== undefined) return stored;
  const symbol = symbolOf(key);
  return symbol ? SYMBOLS[symbol].value(star, recipe) : Number.NaN;
};

const stellarWorking = (derived: Derived, key: string): Working => {
  const definition = definitionOf(derived, key);
  const value = orNull(numberOf(derived, key));
  const blank = blankOf(derived.columns.blanks[blankKey(key)]?.[0]);
  const base = { key, ...wordsOf(key), value, blank };
  const method = METHODS.find((m) => m.key === definition?.method)?.word ?? "";
  if (!definition)
    return {
      ...base,
      ...NOTHING_COMPUTED,
      error: null,
      method,
      inputs: [],
      constants: [],
      ranges: [],
      errorParts: [],
    };
  const inputs = definition.inputs.map((symbol) => inputOf(derived, symbol));
  const constants = [...(definition.constants ?? [])];
  return {
    ...base,
    error: orNull(derived.columns.values[errorKey(key)]?.[0]),
    method,
    formula: definition.formula,
    substituted: substitute(definition.formula, numbersOf(inputs, constants)),
    isRoot: definition.isRoot ?? false,
    inputs,
    constants,
    ranges: rangesOf(derived, definition),
    scatter: definition.scatter ?? "",
    errorParts: errorPartsOf(derived.slots[key as keyof RecordingSlots]?.vector ?? null),
    reference: definition.reference,
  };
};

const seen = (subject: Subject, derived: Derived): Seen | null => {
  const { card, campaign, recipe, given } = subject;
  if (!card || !campaign) return null;
  const value = (key: string): number => derived.columns.values[key]?.[0] ?? given[key] ?? Number.NaN;
  const star: AssessedStar = { ...assessedStar(value, card), reachError: derived.star.reachError };
  return {
    star,
    card,
    campaign,
    recipe,
    assessment: assessStar(star, card, campaign, recipe, newAssessment()),
  };
};

const INSTRUMENT_BLANKS = { noise_1h: "noiseBlank", transits: "transitsBlank", r_min: "rMinBlank" } as const;

/** What the error of the smallest planet is made of. */
const planetErrorParts = ({ assessment, star, card }: Seen): Working["errorParts"] => {
  if (!Number.isFinite(star.reachError)) return [];
  const byNoise = reachErrorByNoise(star, card, assessment.noise1h);
  const noise = { source: "noise, by the error of the magnitude", size: byNoise };
  return [
    { source: "radius and orbit, R★ T^(−1/4)", size: star.reachError },
    ...(byNoise > 0 ? [noise] : []),
  ];
};

const instrumentWorking = (view: Seen, step: SeenStep): Working => {
  const { assessment } = view;
  const reason = INSTRUMENT_BLANKS[step.key as keyof typeof INSTRUMENT_BLANKS];
  const isPlanet = step.key === "r_min";
  return {
    key: step.key,
    symbol: step.symbol,
    label: findColumn(step.key)?.label ?? step.label,
    unit: step.unit,
    value: orNull(step.value),
    error: isPlanet ? orNull(assessment.rMinError) : null,
    blank: blankOf(reason && assessment[reason]),
    method: "",
    formula: step.formula,
    substituted: substitute(step.formula, numbersOf(step.inputs, step.constants ?? [])),
    isRoot: false,
    inputs: [...step.inputs],
    constants: [...(step.constants ?? [])],
    ranges: [],
    scatter: "",
    errorParts: isPlanet ? planetErrorParts(view) : [],
    reference: step.reference,
  };
};

/**
 * The workings of a quantity: that one first, then every step it rests on, each once, down to what was given.
 *
 * @param key a derived column of the registry, or a step's key
 * @returns empty where there is no such quantity, or none without a card and a campaign
 */
export const explain = (subject: Subject, key: string): Working[] => {
  const derived = derive(subject);
  const view = seen(subject, derived);
  const steps = view ? seenSteps(view) : new Map<string, SeenStep>();
  const found = new Map<string, Working>();
  const visit = (next: string): void => {
    if (found.has(next)) return;
    const step = steps.get(next);
    const isStellar = Object.hasOwn(STELLAR_DEFINITIONS, next);
    if (!step && !isStellar) return;
    const working = step && view ? instrumentWorking(view, step) : stellarWorking(derived, next);
    found.set(next, working);
    for (const input of working.inputs) if (input.step !== null) visit(input.step);
  };
  visit(key);
  return [...found.values()];
};
