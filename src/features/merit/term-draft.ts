import { z } from "zod";
import { type Merit, meritBody, type Shape, type Term } from "#shared/api/merits.ts";

/** A term while it is typed: figures are text until they are saved, so that half a figure is no error yet. */
export interface TermDraft {
  /** For the screen alone: terms are told apart while they move. */
  readonly key: string;
  label: string;
  expression: string;
  kind: Shape["kind"];
  /** The shape's figures by name, of every kind that was looked at. */
  figures: Readonly<Record<string, string>>;
  isAbove: boolean;
  /** Points of a table, one a line: value, then what it gives. */
  table: string;
  weight: string;
  blanks: Term["blanks"];
  zeroZeroesAll: boolean;
}

export interface MeritDraft {
  name: string;
  note: string;
  terms: readonly TermDraft[];
}

export const SHAPE_FIGURES = {
  ramp: [
    ["zeroAt", "0 at"],
    ["oneAt", "1 at"],
  ],
  step: [["at", "Step at"]],
  hump: [
    ["low", "Rises from"],
    ["peak", "1 at"],
    ["high", "Falls to 0 at"],
  ],
  loss: [["perUnit", "Lost per unit"]],
  table: [],
} as const satisfies Record<Shape["kind"], readonly (readonly [string, string])[]>;

const figuresOf = (shape: Shape): Record<string, string> =>
  Object.fromEntries(
    Object.entries(shape).flatMap(([name, value]) =>
      typeof value === "number" ? [[name, String(value)]] : [],
    ),
  );

const draftTerm = (term: Term): TermDraft => ({
  key: crypto.randomUUID(),
  label: term.label,
  expression: term.expression,
  kind: term.shape.kind,
  figures: figuresOf(term.shape),
  isAbove: term.shape.kind === "step" ? term.shape.above : true,
  table: term.shape.kind === "table" ? term.shape.points.map((point) => point.join(" ")).join("\n") : "",
  weight: String(term.weight),
  blanks: term.blanks,
  zeroZeroesAll: term.zeroZeroesAll,
});

export const newTerm = (): TermDraft => ({
  key: crypto.randomUUID(),
  label: "",
  expression: "",
  kind: "ramp",
  figures: { zeroAt: "", oneAt: "" },
  isAbove: true,
  table: "",
  weight: "1",
  blanks: "zero",
  zeroZeroesAll: false,
});

export const draftMerit = (merit: Merit | null): MeritDraft =>
  merit
    ? { name: merit.name, note: merit.note, terms: merit.terms.map(draftTerm) }
    : { name: "", note: "", terms: [newTerm()] };

const DECIMAL_COMMA = /^[-+−]?\d+,\d+$/;

/** A figure as typed, or why it is none. A true minus counts as a minus. */
export const readFigure = (text: string): number | string => {
  const trimmed = text.trim();
  if (trimmed === "") return "a figure is missing.";
  const value = Number(trimmed.replace("\u2212", "-"));
  if (Number.isFinite(value)) return value;
  return DECIMAL_COMMA.test(trimmed)
    ? `${trimmed}: use a point for decimals here (${trimmed.replace(",", ".")}).`
    : `${trimmed} is not a figure. Write it with digits, for example 0.35.`;
};

type Complain = (path: string, message: string) => void;

const readPoints = (text: string, complain: Complain): [number, number][] =>
  text
    .split("\n")
    .filter((line) => line.trim() !== "")
    .flatMap((line, i): [number, number][] => {
      const [value = "", gives = "", ...rest] = line.trim().split(/[\s;]+/);
      const [x, y] = [readFigure(value), readFigure(gives)];
      if (typeof x === "number" && typeof y === "number" && rest.length === 0) return [[x, y]];
      complain(
        "shape.table",
        `Line ${i + 1} needs two figures: the value, then what it gives from 0 to 1, for example 1.5 0.8.`,
      );
      return [];
    });

const shapeOf = (draft: TermDraft, complain: Complain): unknown => {
  if (draft.kind === "table") return { kind: "table", points: readPoints(draft.table, complain) };
  const figures = Object.fromEntries(
    SHAPE_FIGURES[draft.kind].map(([name, label]) => {
      const figure = readFigure(draft.figures[name] ?? "");
      if (typeof figure === "string") complain(`shape.${name}`, `${label}: ${figure}`);
      return [name, figure];
    }),
  );
  return { kind: draft.kind, ...figures, ...(draft.kind === "step" ? { above: draft.isAbove } : {}) };
};

/** The shape as it stands, for its picture; null while it is not whole. */
export const shapeDrawn = (draft: TermDraft): Shape | null => {
  let isWhole = true;
  const shape = shapeOf(draft, () => {
    isWhole = false;
  });
  if (!isWhole) return null;
  const parsed = meritBody.shape.terms.safeParse([
    { label: "x", expression: "x", shape, weight: 1, blanks: "zero", zeroZeroesAll: false },
  ]);
  return parsed.success ? (parsed.data[0]?.shape ?? null) : null;
};

const plainTerm = (draft: TermDraft, complain: Complain): unknown => {
  const weight = readFigure(draft.weight);
  if (typeof weight === "string") complain("weight", `Weight: ${weight}`);
  else if (weight < 0 || weight > 100) complain("weight", "A weight lies between 0 and 100.");
  if (draft.label.trim() === "") complain("label", "Give the term a name.");
  if (draft.expression.trim() === "")
    complain("expression", "Write a column or a formula, for example r_min.");
  return {
    label: draft.label,
    expression: draft.expression,
    shape: shapeOf(draft, complain),
    weight,
    blanks: draft.blanks,
    zeroZeroesAll: draft.zeroZeroesAll,
  };
};

/** What is typed, as the contract wants it; figures that are none are named where they stand. */
export const meritDraftSchema = z
  .custom<MeritDraft>()
  .transform((draft, context) => {
    let isWhole = true;
    const complain = (path: (string | number)[], message: string) => {
      isWhole = false;
      context.addIssue({ code: "custom", path, message });
    };
    if (draft.name.trim() === "") complain(["name"], "Give the figure of merit a name.");
    const terms = draft.terms.map((term, i) =>
      plainTerm(term, (path, message) => complain(["terms", i, ...path.split(".")], message)),
    );
    // What is not whole was complained of above; the rest is the contract's to judge.
    return isWhole ? ({ name: draft.name, note: draft.note, terms } as z.input<typeof meritBody>) : z.NEVER;
  })
  .pipe(meritBody);
