import { expect, test } from "vitest";
import { recipeLabel } from "#shared/format/recipe-label.ts";

test("a version of a recipe is named with its number and the first eight digits of its hash", () => {
  const hash = "3f2a91c0".padEnd(64, "0");
  expect(recipeLabel({ name: "Default", number: 1, hash })).toBe("Default v1 · 3f2a91c0");
});
