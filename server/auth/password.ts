import { randomBytes, type ScryptOptions, scrypt, timingSafeEqual } from "node:crypto";

/** Cost as commonly advised for sign-in (N = 2^15, r = 8, p = 1: 32 MiB each); kept in the hash so that it can rise. */
const COST = { N: 2 ** 15, r: 8, p: 1 };
const KEY_BYTES = 32;
const MEMORY = 128 * 1024 * 1024;

const derive = (password: string, salt: Buffer, options: ScryptOptions): Promise<Buffer> =>
  new Promise((resolve, reject) => {
    scrypt(password.normalize("NFKC"), salt, KEY_BYTES, { ...options, maxmem: MEMORY }, (error, key) =>
      error ? reject(error) : resolve(key),
    );
  });

const format = (cost: typeof COST, salt: Buffer, key: Buffer): string =>
  `scrypt$${cost.N}$${cost.r}$${cost.p}$${salt.toString("base64url")}$${key.toString("base64url")}`;

export const hashPassword = async (password: string): Promise<string> => {
  const salt = randomBytes(16);
  return format(COST, salt, await derive(password, salt, COST));
};

/** Stands in where there is no account, so that the answer takes as long. */
const NO_ACCOUNT = format(COST, Buffer.alloc(16), Buffer.alloc(KEY_BYTES));

/** Whether the password belongs to the hash; with no hash it does the same work and says no. */
export const verifyPassword = async (password: string, hash: string | null): Promise<boolean> => {
  const [, N, r, p, salt, key] = (hash ?? NO_ACCOUNT).split("$");
  const expected = Buffer.from(key ?? "", "base64url");
  const given = await derive(password, Buffer.from(salt ?? "", "base64url"), {
    N: Number(N),
    r: Number(r),
    p: Number(p),
  });
  return expected.length === given.length && timingSafeEqual(expected, given) && hash !== null;
};
