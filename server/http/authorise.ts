import type { Request } from "express";
import { type Action, type Actor, can, RIGHTS, rolesThatCan } from "#shared/policy/rights.ts";
import { ROLE_LABELS, type Role } from "#shared/policy/roles.ts";
import { Member } from "../database/entities/member.entity.ts";
import type { Deps } from "../deps.ts";
import { AppError, notFound } from "../errors.ts";
import type { Access, Caller } from "./route.ts";

interface Who {
  caller: Caller;
  actor: Actor;
  programmeId: string;
}

const NOBODY: Caller = { id: "", name: "", email: "", isInstallationAdministrator: false };
const NO_ROLES: Actor = { roles: [] };

const signedIn = (req: Request): Caller => {
  if (req.user) return req.user;
  throw new AppError(401, "signed-out", "You are not signed in, or your session has ended.", {
    hint: "Sign in and try again.",
  });
};

const inWords = (roles: readonly Role[]): string => {
  const labels = roles.map((role) => ROLE_LABELS[role]);
  return labels.length < 2 ? labels.join("") : `${labels.slice(0, -1).join(", ")} or ${labels.at(-1)}`;
};

const refused = (action: Action): AppError =>
  new AppError(403, "not-granted", "Your roles in this programme do not allow that.", {
    hint: `Ask someone who holds the role ${inWords(rolesThatCan(action))}.`,
  });

/** Roles in the programme; a programme one is no member of does not exist. */
const actorIn = async (deps: Deps, programmeId: string, personId: string): Promise<Actor> => {
  if (!/^[1-9][0-9]{0,18}$/.test(programmeId)) throw notFound("This programme");
  const member = await deps.db.manager.findOneBy(Member, { programmeId, personId });
  if (!member) throw notFound("This programme");
  return { roles: member.roles as Role[] };
};

const isAction = (access: Access): access is Action => Object.hasOwn(RIGHTS, access);

/** Answers who calls and with which roles, or refuses. What no rule grants is denied. */
export const authorise = async (deps: Deps, req: Request, access: Access): Promise<Who> => {
  if (access === "anyone") return { caller: req.user ?? NOBODY, actor: NO_ROLES, programmeId: "" };
  const caller = signedIn(req);
  if (access === "signed-in") return { caller, actor: NO_ROLES, programmeId: "" };
  if (access === "installation-administrator") {
    if (caller.isInstallationAdministrator) return { caller, actor: NO_ROLES, programmeId: "" };
    throw new AppError(403, "not-granted", "Only an administrator of this installation may do that.", {
      hint: "Ask whoever runs this installation.",
    });
  }
  if (!isAction(access)) throw new Error(`No rule for access "${String(access)}".`);
  const programmeId = String(req.params.programmeId ?? "");
  const actor = await actorIn(deps, programmeId, caller.id);
  if (!can(actor, access)) throw refused(access);
  return { caller, actor, programmeId };
};
