import { z } from "zod";
import { LIMITS } from "#shared/limits.ts";
import { LOG_LEVELS } from "../log.ts";

export type Environment = Readonly<Record<string, string | undefined>>;

const wholeNumber = (least: number, most: number, what: string) => {
  const message = `must be ${what}, a whole number from ${least} to ${most}.`;
  return z
    .string()
    .regex(/^\d+$/, message)
    .transform(Number)
    .pipe(z.number().min(least, message).max(most, message));
};

const yesNo = z.stringbool({ error: "must be true or false." });

const address = (schemes: string[], what: string) =>
  z
    .string()
    .refine(
      (text) => URL.canParse(text) && schemes.includes(new URL(text).protocol.slice(0, -1)),
      `must be ${what}, beginning with ${schemes.map((scheme) => `${scheme}://`).join(" or ")}.`,
    );

/** One entry per setting; the README has the same list for people. Messages continue the setting's name. */
export const settingsSchema = z.object({
  SHORTLIGHT_PORT: wholeNumber(0, 65535, "the port to listen on").default(4400),
  SHORTLIGHT_HOST: z
    .string()
    .regex(/^[\w.:-]+$/, "must be the name or number of a network interface, such as 127.0.0.1 or 0.0.0.0.")
    .default("127.0.0.1"),
  SHORTLIGHT_PUBLIC_URL: address(["http", "https"], "the address people type")
    .transform((text) => text.replace(/\/+$/, ""))
    .optional(),
  SHORTLIGHT_SESSION_SECRET: z
    .string()
    .min(32, "must have at least 32 characters; leave it out and one is made and kept.")
    .optional(),
  SHORTLIGHT_SMTP_URL: address(["smtp", "smtps"], "the address of a mail server").optional(),
  SHORTLIGHT_MAIL_FROM: z
    .string()
    .regex(/^[^\r\n]*@[^\r\n]*$/, "must be a mail address, such as Shortlight <shortlight@example.org>.")
    .default("Shortlight <shortlight@localhost>"),
  SHORTLIGHT_VAR: z.string().default("var"),
  SHORTLIGHT_FILES: z.string().optional(),
  SHORTLIGHT_SCAN: z.string().optional(),
  SHORTLIGHT_TRUSTED_PROXIES: wholeNumber(0, 10, "how many proxies stand in front").default(0),
  SHORTLIGHT_LOG_LEVEL: z
    .enum(LOG_LEVELS, { error: `must be one of ${LOG_LEVELS.join(", ")}.` })
    .default("info"),
  SHORTLIGHT_DEMO: yesNo.default(true),
  SHORTLIGHT_UPLOAD_BYTES: wholeNumber(1, 2 ** 40, "the most bytes one file may have").default(
    LIMITS.fileBytes,
  ),
  SHORTLIGHT_RATE_LIMITS: yesNo.default(true),
});

export const SETTING_NAMES: readonly string[] = Object.keys(settingsSchema.shape);
