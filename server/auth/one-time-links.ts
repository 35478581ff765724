import type { EntityManager } from "typeorm";
import { LIMITS } from "#shared/limits.ts";
import { OneTimeLink } from "../database/entities/one-time-link.entity.ts";
import { AppError, notFound } from "../errors.ts";
import { newToken, tokenHash } from "./tokens.ts";

type Purpose = OneTimeLink["purpose"];

const HOUR = 3600_000;
const VALID_FOR: Record<Purpose, number> = {
  invitation: LIMITS.invitationDays * 24 * HOUR,
  "password-reset": LIMITS.passwordResetHours * HOUR,
};

const unusable = (code: string, message: string, purpose: Purpose): AppError =>
  new AppError(410, code, message, {
    hint:
      purpose === "invitation"
        ? "Ask an administrator of the programme for a new invitation."
        : "Ask for a new link on the sign-in page.",
  });

export interface NewLink {
  purpose: Purpose;
  email: string;
  personId: string | null;
  programmeId: string | null;
  roles: string[] | null;
  madeBy: string | null;
}

/** Makes a link; its token is answered once, here, and only its hash is kept. Earlier open ones of the same kind end. */
export const createLink = async (
  tx: EntityManager,
  link: NewLink,
  now: Date,
): Promise<{ id: string; token: string; expiresAt: Date }> => {
  await withdrawLinks(tx, link, now);
  const token = newToken();
  const expiresAt = new Date(now.getTime() + VALID_FOR[link.purpose]);
  const made = await tx.save(OneTimeLink, {
    ...link,
    tokenHash: tokenHash(token),
    createdAt: now,
    expiresAt,
    usedAt: null,
    withdrawnAt: null,
  });
  return { id: made.id, token, expiresAt };
};

/** Ends the open links of that purpose to that address, in that programme where there is one. */
export const withdrawLinks = async (
  tx: EntityManager,
  link: Pick<NewLink, "purpose" | "email" | "programmeId">,
  now: Date,
): Promise<void> => {
  await tx.query(
    `UPDATE one_time_link SET withdrawn_at = ?
     WHERE purpose = ? AND email = ? AND programme_id <=> ? AND used_at IS NULL AND withdrawn_at IS NULL`,
    [now, link.purpose, link.email, link.programmeId],
  );
};

/** The link behind a token, if it can still be used. With `lock`, nobody else uses it until the transaction ends. */
export const openLink = async (
  tx: EntityManager,
  purpose: Purpose,
  token: string,
  now: Date,
  lock = false,
): Promise<OneTimeLink> => {
  const link = await tx.findOne(OneTimeLink, {
    where: { tokenHash: tokenHash(token), purpose },
    ...(lock ? { lock: { mode: "pessimistic_write" } } : {}),
  });
  if (!link) throw notFound("This link");
  if (link.usedAt)
    throw unusable("link-used", "This link has been used already, and each works once.", purpose);
  if (link.withdrawnAt)
    throw unusable("link-withdrawn", "This link was withdrawn or replaced by a newer one.", purpose);
  if (link.expiresAt <= now)
    throw unusable("link-expired", `This link ended at ${inUtc(link.expiresAt)}.`, purpose);
  return link;
};

/** Opens the link for good: a second use finds it used. Call it in the transaction of what the link is for. */
export const useLink = async (
  tx: EntityManager,
  purpose: Purpose,
  token: string,
  now: Date,
): Promise<OneTimeLink> => {
  const link = await openLink(tx, purpose, token, now, true);
  await tx.update(OneTimeLink, { id: link.id }, { usedAt: now });
  return link;
};

const inUtc = (moment: Date): string => `${moment.toISOString().slice(0, 16).replace("T", " ")} UTC`;
