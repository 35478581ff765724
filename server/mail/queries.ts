import type { EntityManager } from "typeorm";
import { Mail } from "../database/entities/mail.entity.ts";

const NEWEST = 100;

export const keptMails = (tx: EntityManager): Promise<Mail[]> =>
  tx.find(Mail, { where: { state: "kept" }, order: { id: "DESC" }, take: NEWEST });
