import { findMeaning, KEPT } from "#shared/catalogue/header-spellings.ts";

export const meaningLabel = (key: string): string =>
  key === KEPT ? "Kept as text" : (findMeaning(key)?.label ?? key);
