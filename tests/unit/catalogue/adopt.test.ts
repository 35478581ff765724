import { describe, expect, test } from "vitest";
import { adopt, GIVEN } from "#server/catalogue/adopt.ts";
import { normaliseDesignation } from "#server/catalogue/designation.ts";
import { Fingerprint } from "#server/catalogue/fingerprint.ts";
import { IdentifierSet } from "#server/catalogue/identifier-set.ts";

const entry = (values: Record<string, number | string>) => GIVEN.map((key) => values[key] ?? null);
const adopted = (...entries: Record<string, number | string>[]) => {
  const row = adopt(entries.map(entry));
  return Object.fromEntries(GIVEN.flatMap((key, i) => (row[i] === null ? [] : [[key, row[i]]])));
};

describe("adopting values", () => {
  test("takes the preferred entry that has a value, with that entry's error", () => {
    expect(adopted({ ks_mag: 8 }, { ks_mag: 8.1, ks_mag_err: 0.02, j_mag: 9, j_mag_err: 0.03 })).toEqual({
      ks_mag: 8,
      j_mag: 9,
      j_mag_err: 0.03,
    });
  });

  test("never mixes a position with another entry's epoch, nor half a motion with the other half", () => {
    expect(
      adopted({ ra: 1, dec: 2, pmra: 5 }, { ra: 3, dec: 4, epoch: 2016, pmra: 6, pmdec: 7, pmdec_err: 0.1 }),
    ).toEqual({ ra: 1, dec: 2, pmra: 6, pmdec: 7, pmdec_err: 0.1 });
  });

  test("keeps an identifier with its own release", () => {
    expect(adopted({ source_id: "1" }, { source_id: "2", release: "second" })).toEqual({ source_id: "1" });
  });

  test("a star of which nothing is said has nothing", () => expect(adopted()).toEqual({}));
});

test("designations are one in several spellings, and component letters count", () => {
  expect(normaliseDesignation("BD+23_3912")).toBe(normaliseDesignation("bd +23  3912"));
  expect(normaliseDesignation("X 115404A")).not.toBe(normaliseDesignation("X 115404"));
});

test("a fingerprint depends on what there is, not on the order nor on the way there", () => {
  const [one, other] = [new Fingerprint(), new Fingerprint()];
  for (const row of ["a", "b", "c"]) one.add(row);
  for (const row of ["c", "x", "a"]) other.add(row);
  expect(other.toString()).not.toBe(one.toString());
  const later = new Fingerprint(other.toString());
  later.remove("x");
  later.add("b");
  expect(later.toString()).toBe(one.toString());
  expect(one.toString()).toMatch(/^[0-9a-f]{64}$/);
});

test("a set of identifiers tells new from seen, beyond the size it began with", () => {
  const set = new IdentifierSet();
  const id = (i: number): string => `i||${6_000_000_000_000_000_000n + BigInt(i)}`;
  const numbers = Array.from({ length: 60_000 }, (_, i) => i);
  expect(numbers.filter((i) => !set.add(id(i)))).toEqual([]);
  expect(numbers.filter((i) => set.add(id(i)))).toEqual([]);
  expect(set.add(id(60_001))).toBe(true);
});
