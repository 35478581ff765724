import type { LogbookLine } from "#shared/api/programmes.ts";

/** Past tense of the verbs that stand in actions. */
const VERBS: Readonly<Record<string, string>> = {
  cancel: "cancelled",
  "choose-recipe": "chose a recipe for",
  commit: "committed",
  create: "began",
  delete: "deleted",
  describe: "described",
  edit: "changed",
  export: "exported",
  import: "imported",
  invite: "invited",
  make: "made",
  "make-edition": "made",
  move: "moved on",
  "reset-password": "reset the password of",
  "change-password": "changed the password of",
  "set-star": "set a star of",
  "sign-out-everywhere": "signed out everywhere:",
  plan: "planned how to read",
  receive: "received",
  recompute: "recomputed",
  remove: "removed",
  rename: "renamed",
  save: "saved",
  "send-to-review": "sent to review",
  withdraw: "withdrew",
};

/** Where who did it and what it was done to are the same person. */
const OF_ONESELF: Readonly<Record<string, string>> = {
  "member.join": "joined the programme",
  "member.leave": "left the programme",
};

/** What was done, without who: "changed list Winter first light". A verb without a word of its own stays as it is. */
export const deedOf = ({ action, subject }: Pick<LogbookLine, "action" | "subject">): string => {
  const own = OF_ONESELF[action];
  if (own) return own;
  const verb = action.slice(action.indexOf(".") + 1);
  return `${VERBS[verb] ?? verb.replaceAll("-", " ")} ${subject}`;
};

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value);

const inWords = (value: unknown): string => {
  if (value === null || value === undefined || value === "") return "(blank)";
  if (typeof value === "string") return value;
  if (Array.isArray(value) && value.every((part) => !isPlain(part) && !Array.isArray(part)))
    return value.length === 0 ? "(none)" : value.map(inWords).join(", ");
  return isPlain(value) || Array.isArray(value) ? JSON.stringify(value, null, 1) : String(value);
};

/** One thing that a line says of before and after. */
export interface Difference {
  name: string;
  before: string | null;
  after: string | null;
}

const parts = (value: unknown): Record<string, unknown> => {
  if (value === null || value === undefined) return {};
  return isPlain(value) ? value : { value };
};

/** What a line records, name by name; what did not change is left out where both sides are there. */
export const differencesOf = ({ before, after }: Pick<LogbookLine, "before" | "after">): Difference[] => {
  const [old, now] = [parts(before), parts(after)];
  const names = [...new Set([...Object.keys(old), ...Object.keys(now)])];
  return names
    .map((name) => ({
      name,
      before: name in old ? inWords(old[name]) : null,
      after: name in now ? inWords(now[name]) : null,
    }))
    .filter((difference) => difference.before !== difference.after);
};
