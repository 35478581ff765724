/** Digits of a content hash that people read. */
const DIGITS = 8;

/** The first digits of a content hash, enough to tell two settings apart by eye. */
export const shortHash = (hash: string): string => hash.slice(0, DIGITS);

/**
 * A version of a recipe in one line, the same on screen and in files.
 *
 * @example recipeLabel({ name: "Default", number: 1, hash: "3f2a91c0…" }) // "Default v1 · 3f2a91c0"
 */
export const recipeLabel = (recipe: { name: string; number: number; hash: string }): string =>
  `${recipe.name} v${recipe.number} · ${shortHash(recipe.hash)}`;
