import type { TableColumn } from "../formats/table.ts";

const WITH = /cos|\*|\bstar\b|_?alpha_?star|great[\s-]circle/i;
const WITHOUT = /\b(?:not|without|no)\b[^.]{0,40}\bcos|\bcos[^.]{0,30}\bnot\b|coordinate angle/i;

/**
 * Whether a motion in right ascension is multiplied by the cosine of the declination, as its description or name tells it;
 * null where they leave it open. `pmra` all in small letters is the name that a survey and the catalogue give the product.
 */
export const hasCosDecOf = ({
  name,
  description,
}: Pick<TableColumn, "name" | "description">): boolean | null => {
  if (WITHOUT.test(description)) return false;
  if (WITH.test(description) || WITH.test(name)) return true;
  return /^(?:\w+\.)?pmra(?:\s*[[(].*)?$/.test(name.trim()) ? true : null;
};
