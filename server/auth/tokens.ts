import { createHash, randomBytes } from "node:crypto";

/** 256 random bits, safe in an address. */
export const newToken = (): string => randomBytes(32).toString("base64url");

/** What is kept of a token. No salt: it is random enough to have nothing in a dictionary. */
export const tokenHash = (token: string): string => createHash("sha256").update(token).digest("hex");
