import { z } from "zod";
import { ROLES } from "../policy/roles.ts";
import { cursorQuery, id, name, note, personRef, timestamp, version } from "./common.ts";
import { recipeRef } from "./recipes.ts";
import { email } from "./session.ts";

/** GET /api/programmes/:programmeId → { programme }; PATCH → { programme }; POST /api/programmes (installation administrators) → 201. */
export const programme = z.object({
  id,
  name: z.string(),
  description: z.string(),
  /** True where the sky is invented: said on every screen. */
  isInvented: z.boolean(),
  /** The version that the catalogue is derived by. */
  recipe: recipeRef,
  /** Number of the catalogue edition in force; null before the first. */
  edition: z.int().nullable(),
  stars: z.int(),
  version,
  counts: z.object({
    extracts: z.int(),
    instruments: z.int(),
    selections: z.int(),
    merits: z.int(),
    lists: z.int(),
    members: z.int(),
  }),
});
export type Programme = z.infer<typeof programme>;
export const programmeCreateBody = z.strictObject({ name, description: note });
export const programmePatchBody = z.strictObject({
  name: name.optional(),
  description: note.optional(),
  version,
});

/** GET …/members → { members }; PATCH …/members/:personId; DELETE …/members/:personId → 204. */
export const member = z.object({
  person: personRef.extend({ email: z.string() }),
  roles: z.array(z.enum(ROLES)),
  since: timestamp,
  state: z.enum(["active", "deactivated"]),
});
export type Member = z.infer<typeof member>;
export const rolesBody = z.strictObject({
  roles: z.array(z.enum(ROLES)).min(1, "A member holds at least one role."),
});
/** POST …/invitations → 201 { invitation }; GET → { invitations }; DELETE …/invitations/:id → 204. */
export const invitationBody = z.strictObject({ email, roles: rolesBody.shape.roles });
export const invitation = z.object({
  id,
  email: z.string(),
  roles: z.array(z.enum(ROLES)),
  createdAt: timestamp,
  expiresAt: timestamp,
  state: z.enum(["open", "used", "expired", "withdrawn"]),
});
export type Invitation = z.infer<typeof invitation>;

/** GET …/logbook?cursor&limit&subject → { lines, next? }, newest first. */
export const logbookQuery = cursorQuery.extend({ subject: z.string().max(100).optional() });
export const logbookLine = z.object({
  id,
  sequence: z.int(),
  at: timestamp,
  actor: z.string(),
  action: z.string(),
  /** e.g. "extract 3", "list Winter first light" */
  subject: z.string(),
  before: z.unknown().nullable(),
  after: z.unknown().nullable(),
  hash: z.string(),
});
export type LogbookLine = z.infer<typeof logbookLine>;
