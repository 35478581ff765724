import { QueryFailedError } from "typeorm";
import { describe, expect, test } from "vitest";
import { hashPassword, verifyPassword } from "#server/auth/password.ts";
import { conflict } from "#server/errors.ts";
import { knownError } from "#server/http/known-errors.ts";
import { canonicalJson } from "#server/logbook/chain.ts";

const coded = (code: string, more: object = {}): Error => Object.assign(new Error(code), { code, ...more });
const ofDatabase = (error: Error): Error => new QueryFailedError("SELECT 1", [], error);

describe("failures whose cause is known", () => {
  test.each([
    [coded("ENOSPC"), 507, "disk-full"],
    [ofDatabase(coded("ER_RECORD_FILE_FULL")), 507, "disk-full"],
    [coded("ECONNREFUSED"), 503, "database-unavailable"],
    [ofDatabase(coded("PROTOCOL_CONNECTION_LOST")), 503, "database-unavailable"],
    [ofDatabase(coded("ECONNRESET")), 503, "database-unavailable"],
    [coded("ECONNRESET", { fatal: true }), 503, "database-unavailable"],
    [coded("x", { type: "entity.too.large" }), 413, "too-large"],
    [coded("x", { type: "entity.parse.failed" }), 400, "unreadable-request"],
  ])("%s is answered with what, why and what to do", (error, status, code) => {
    const known = knownError(error);
    expect([known?.status, known?.code]).toEqual([status, code]);
    expect(known?.message).toMatch(/^[A-Z].*\.$/);
    expect(known?.hint).toBeTruthy();
  });

  test("a refusal is passed on as it is; a defect and a caller who hung up are not known", () => {
    const refusal = conflict("x", "y");
    expect(knownError(refusal)).toBe(refusal);
    expect(knownError(new TypeError("undefined is not a function"))).toBeUndefined();
    expect(knownError(ofDatabase(coded("ER_NO_SUCH_TABLE")))).toBeUndefined();
    expect(knownError(coded("ECONNRESET"))).toBeUndefined();
    expect(knownError("text")).toBeUndefined();
  });
});

describe("passwords", () => {
  test("are kept as scrypt with cost and a salt of their own, and checked against that", async () => {
    const [one, two] = [await hashPassword("pass phrase of mine"), await hashPassword("pass phrase of mine")];
    expect(one).toMatch(/^scrypt\$32768\$8\$1\$[\w-]{22}\$[\w-]{43}$/);
    expect(one).not.toBe(two);
    expect(await verifyPassword("pass phrase of mine", one)).toBe(true);
    expect(await verifyPassword("pass phrase of min", one)).toBe(false);
  });

  test("typed with composed or combining letters are the same", async () => {
    expect(await verifyPassword("cafe\u0301 du matin", await hashPassword("caf\u00e9 du matin"))).toBe(true);
  });

  test("never fit where there is no account", async () => {
    expect(await verifyPassword("", null)).toBe(false);
    expect(await verifyPassword("anything", null)).toBe(false);
  });
});

test("the same content is the same text in the logbook, whatever the order of its keys", () => {
  expect(canonicalJson({ b: [{ z: 1, a: null }], a: 0.1 })).toBe('{"a":0.1,"b":[{"a":null,"z":1}]}');
  expect(canonicalJson({ at: new Date(0) })).toBe('{"at":"1970-01-01T00:00:00.000Z"}');
});
