import { z } from "zod";
import { type Card, cardBody, cardSettings } from "#shared/api/instruments.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { choicesOf, fieldsOf, type Model, type NumberField } from "./card-fields.ts";

/** A card as it is being typed: every figure is still text, and so is every choice; blank where the card says nothing. */
export interface CardDraft {
  name: string;
  source: string;
  model: Model;
  passband: string;
  photonBand: string;
  figures: Readonly<Record<string, string>>;
}

/** What a new card starts from: plain figures, none of any existing instrument. */
const FIRST_FIGURES: Readonly<Record<Model, Readonly<Record<string, string>>>> = {
  formula: {
    referenceMagnitude: "10",
    photonPpm: "100",
    backgroundPpm: "10",
    floorPpm: "30",
    brightLimit: "7",
    faintLimit: "14",
  },
  detector: {
    apertureM: "0.5",
    obstruction: "0.3",
    throughput: "0.4",
    pixelScale: "1",
    fwhmPx: "2.5",
    apertureRadiusPx: "5",
    skyPixels: "800",
    readNoise: "8",
    darkRate: "0.05",
    fullWell: "100000",
    exposureS: "20",
    overheadS: "5",
    skyBrightness: "20.5",
    extinction: "0.1",
    airmass: "1.2",
    siteAltitudeM: "2000",
    floorPpm: "150",
    brightLimit: "8",
    faintLimit: "15",
  },
};

export const emptyDraft = (): CardDraft => ({
  name: "",
  source: "",
  model: "detector",
  passband: "rp_mag",
  photonBand: "R",
  figures: FIRST_FIGURES.detector,
});

/** The other model with what both have in common; figures that only it has start from plain ones. */
export const withModel = (draft: CardDraft, model: Model): CardDraft => ({
  ...draft,
  model,
  figures: { ...FIRST_FIGURES[model], ...draft.figures },
});

/** What a card may leave unsaid, as blanks. */
const unsaid = (model: Model): Readonly<Record<string, string>> =>
  Object.fromEntries(
    [...fieldsOf(model).filter(({ blank }) => blank === "absent"), ...choicesOf(model)].map(({ key }) => [
      key,
      "",
    ]),
  );

export const draftOf = ({ name, source, settings }: Card): CardDraft => {
  const { model, passband, ...rest } = settings;
  const { photonBand, ...figures } = { photonBand: "R", ...rest };
  return {
    name,
    source,
    model,
    passband,
    photonBand,
    figures: {
      ...unsaid(model),
      ...Object.fromEntries(
        Object.entries(figures).map(([key, value]) => [key, value === null ? "" : String(value)]),
      ),
    },
  };
};

/** A figure as typed: spaces between thousands count for nothing, a true minus is one. NaN where it is none. */
export const readFigure = (text: string): number => {
  const plain = text.replace(/[\s\u2009\u202f]/g, "").replace(/\u2212/g, "-");
  return plain === "" ? Number.NaN : Number(plain);
};

const whyNot = (label: string, text: string): string => {
  if (text.trim() === "") return `${label} is blank. Enter a number.`;
  if (/^[\d\s]+,\d+$/.test(text.trim()))
    return `“${text}”: use a point for decimals here (${text.replace(",", ".")}).`;
  return `“${text}” is not a number. Enter ${label.toLowerCase()} in figures.`;
};

type Settings = z.infer<typeof cardSettings>;

const textOf = (draft: CardDraft, key: string): string => (draft.figures[key] ?? "").trim();

/** Whether a figure is left blank where it may be. */
const isLeftBlank = (draft: CardDraft, { key, blank }: NumberField): boolean =>
  blank !== undefined && textOf(draft, key) === "";

const settingsOf = (draft: CardDraft): Record<string, unknown> => {
  const figures = fieldsOf(draft.model).flatMap((field): [string, number | null][] => {
    if (!isLeftBlank(draft, field)) return [[field.key, readFigure(textOf(draft, field.key))]];
    return field.blank === "null" ? [[field.key, null]] : [];
  });
  const choices = choicesOf(draft.model).flatMap(({ key }): [string, string][] =>
    textOf(draft, key) === "" ? [] : [[key, textOf(draft, key)]],
  );
  return {
    model: draft.model,
    passband: draft.passband,
    ...(draft.model === "detector" ? { photonBand: draft.photonBand } : {}),
    ...Object.fromEntries<unknown>([...figures, ...choices]),
  };
};

/** The settings where every figure can be used, for the picture beside the form. */
export const usableSettings = (draft: CardDraft): CardSettings | null => {
  const parsed = cardSettings.safeParse(settingsOf(draft));
  return parsed.success ? parsed.data : null;
};

/** Our words for a limit that the contract states as a bare number. */
const inWords = (issue: z.core.$ZodIssue, label: string): string => {
  if (!issue.message.startsWith("Too ")) return issue.message;
  if (issue.code === "too_big") return `${label} is at most ${String(issue.maximum)}.`;
  if (issue.code === "too_small") return `${label} is at least ${String(issue.minimum)}.`;
  return issue.message;
};

/** Reads a draft into what is sent; each refusal stands beside its field, named by `figures.<key>`. */
export const draftSchema = z
  .custom<CardDraft>()
  .transform((draft, context): { name: string; source: string; settings: Settings } => {
    const fields = fieldsOf(draft.model);
    const refuse = (path: string[], message: string) =>
      context.addIssue({ code: "custom", path, message, input: draft });
    const unread = fields.filter(
      (field) => !isLeftBlank(draft, field) && !Number.isFinite(readFigure(textOf(draft, field.key))),
    );
    for (const { key, label } of unread) refuse(["figures", key], whyNot(label, draft.figures[key] ?? ""));
    const body = { name: draft.name, source: draft.source, settings: settingsOf(draft) };
    const parsed = cardBody.safeParse(body);
    if (parsed.success) return parsed.data;
    for (const issue of parsed.error.issues) {
      const [head, key = ""] = issue.path.map(String);
      if (head !== "settings") refuse([head ?? ""], issue.message);
      else if (!unread.some((f) => f.key === key))
        refuse(["figures", key], inWords(issue, fields.find((f) => f.key === key)?.label ?? "It"));
    }
    return z.NEVER;
  });
