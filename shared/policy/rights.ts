import type { Role } from "./roles.ts";

/**
 * THE table of rights: what each role may do in a programme. Server guards refuse by it, client controls hide by
 * it. What does not stand here is denied.
 */
const READERS: readonly Role[] = [
  "curator",
  "scientist",
  "reviewer",
  "lead",
  "instrument-team",
  "guest",
  "administrator",
];
const MEMBERS: readonly Role[] = [
  "curator",
  "scientist",
  "reviewer",
  "lead",
  "instrument-team",
  "administrator",
];

export const RIGHTS = {
  "programme.read": READERS,
  "programme.edit": ["administrator", "lead"],
  "programme.choose-recipe": ["curator", "lead"],
  "member.read": MEMBERS,
  "member.edit": ["administrator"],
  "logbook.read": MEMBERS,
  "job.read": MEMBERS,
  "job.cancel": ["curator", "lead", "administrator"],
  "extract.read": MEMBERS,
  "extract.edit": ["curator"],
  "plan.read": MEMBERS,
  "plan.edit": ["curator", "lead"],
  "catalogue.read": READERS,
  "recipe.read": READERS,
  "recipe.edit": ["curator", "lead"],
  "instrument.read": READERS,
  "instrument.edit": ["instrument-team", "scientist", "lead"],
  "selection.read": MEMBERS,
  "selection.edit": ["scientist", "lead", "curator"],
  "merit.read": MEMBERS,
  "merit.edit": ["scientist", "lead"],
  "list.read": READERS,
  "list.make": ["scientist", "lead"],
  "list.edit": ["scientist", "lead", "reviewer"],
  "list.send-to-review": ["scientist", "lead"],
  "list.export": ["scientist", "lead", "reviewer", "instrument-team", "curator"],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof RIGHTS;

export const ACTIONS = Object.keys(RIGHTS) as Action[];

/** Who asks: the roles held in the programme at hand; none for a stranger. */
export interface Actor {
  readonly roles: readonly Role[];
}

/** Whether the actor may do that in the programme whose roles it carries. Pure; denies by default. */
export const can = (actor: Actor, action: Action): boolean => {
  const granted: readonly Role[] = RIGHTS[action] ?? [];
  return actor.roles.some((role) => granted.includes(role));
};

/** The roles that may do it, for a message that says whom to ask. */
export const rolesThatCan = (action: Action): readonly Role[] => RIGHTS[action];
