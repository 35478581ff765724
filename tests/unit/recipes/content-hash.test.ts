import { describe, expect, test } from "vitest";
import { canonicalJson, contentHash } from "#server/recipes/content-hash.ts";
import { DEFAULT_RECIPE } from "#shared/science/recipes.ts";

const { settings } = DEFAULT_RECIPE;

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null && !Array.isArray(value);

/** The same content with the keys of every object the other way round. */
const reversed = (value: unknown): unknown => {
  if (Array.isArray(value)) return value.map(reversed);
  if (!isPlain(value)) return value;
  return Object.fromEntries(
    Object.keys(value)
      .toReversed()
      .map((key) => [key, reversed(value[key])]),
  );
};

/** Every content that differs from the given one in a single leaf. */
function* oneLeafChanged(value: unknown): Generator<unknown> {
  if (Array.isArray(value)) {
    yield [...value, "another"];
    if (value.length > 1) yield value.toReversed();
    return;
  }
  if (isPlain(value)) {
    for (const [key, part] of Object.entries(value))
      for (const changed of oneLeafChanged(part)) yield { ...value, [key]: changed };
    return;
  }
  if (typeof value === "number") yield value + 1e-9;
  if (typeof value === "boolean") yield !value;
  if (typeof value === "string") yield `${value}.`;
}

describe("the hash of a content", () => {
  test("is SHA-256 of its canonical JSON", () => {
    // Computed with sha256sum over the bytes {"a":1,"b":[2,{"c":0.1,"d":true}]}
    const content = { b: [2, { d: true, c: 0.1 }], a: 1 };
    expect(canonicalJson(content)).toBe('{"a":1,"b":[2,{"c":0.1,"d":true}]}');
    expect(contentHash(content)).toBe("4d3d281927cbd44b633e4598aafc743d06c6eba7ec134344a6b92b4d1659a20f");
  });

  test("does not depend on the order of keys", () => {
    expect(Object.keys(reversed(settings) as object)).not.toEqual(Object.keys(settings));
    expect(contentHash(reversed(settings))).toBe(contentHash(settings));
  });

  test("changes with any single setting, the order of a list too", () => {
    const changed = [...oneLeafChanged(settings)];
    expect(changed.length).toBeGreaterThan(25);
    const hashes = new Set([settings, ...changed].map(contentHash));
    expect(hashes.size).toBe(changed.length + 1);
  });

  test("is the same after a way through JSON", () => {
    expect(contentHash(JSON.parse(JSON.stringify(settings)))).toBe(contentHash(settings));
  });
});
