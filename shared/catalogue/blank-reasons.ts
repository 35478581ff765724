/**
 * Why a cell is empty. A closed set: hot loops carry the code beside a NaN, screens show `word`, panels and
 * messages show `sentence`. Codes are stored, so a code never changes its meaning; new ones are added at the end.
 */

export type BlankKind = "not-given" | "out-of-range" | "input-missing" | "held" | "withheld";

export interface BlankReason {
  readonly code: number;
  readonly key: string;
  readonly kind: BlankKind;
  /** The short muted word in the cell. */
  readonly word: string;
  readonly sentence: string;
}

const reason = (code: number, key: string, kind: BlankKind, word: string, sentence: string): BlankReason => ({
  code,
  key,
  kind,
  word,
  sentence,
});

/** Code 0 means that the value is there. */
export const PRESENT = 0;

export const BLANK_REASONS = [
  reason(1, "not-given", "not-given", "not given", "No extract gives this value."),
  reason(2, "needs-parallax", "input-missing", "needs parallax", "A parallax is needed and none is given."),
  reason(
    3,
    "needs-parallax-error",
    "input-missing",
    "needs parallax error",
    "The parallax has no error, so its quality cannot be judged.",
  ),
  reason(
    4,
    "parallax-not-positive",
    "out-of-range",
    "parallax ≤ 0",
    "The parallax is zero or negative. It is kept as measured and gives no distance.",
  ),
  reason(
    5,
    "parallax-too-uncertain",
    "out-of-range",
    "parallax uncertain",
    "The parallax error exceeds the share of the parallax that the recipe allows (a tenth by default): its inverse is no fair distance.",
  ),
  reason(6, "needs-ks", "input-missing", "needs Ks", "A Ks magnitude is needed and none is given."),
  reason(7, "needs-distance", "input-missing", "needs distance", "A distance is needed and there is none."),
  reason(
    8,
    "outside-radius-relation",
    "out-of-range",
    "out of range",
    "M Ks lies outside the range in which the recipe uses the radius relation for cool dwarfs, 4.6 to 9.8 at most.",
  ),
  reason(
    9,
    "outside-mass-relation",
    "out-of-range",
    "out of range",
    "M Ks lies outside the range in which the recipe uses the mass relation for cool dwarfs, 4.6 to 9.8 at most.",
  ),
  reason(
    10,
    "needs-teff",
    "input-missing",
    "needs Teff",
    "An effective temperature is needed; none is given and no colour gives one.",
  ),
  reason(
    11,
    "outside-teff-relation",
    "out-of-range",
    "out of range",
    "The colours lie outside the range of the temperature relations.",
  ),
  reason(
    12,
    "needs-radius",
    "input-missing",
    "needs radius",
    "The radius of the star is needed and is blank.",
  ),
  reason(13, "needs-mass", "input-missing", "needs mass", "The mass of the star is needed and is blank."),
  reason(
    14,
    "needs-luminosity",
    "input-missing",
    "needs L",
    "The luminosity of the star is needed and is blank.",
  ),
  reason(
    15,
    "outside-habitable-zone",
    "out-of-range",
    "out of range",
    "The temperature lies outside 2600 to 7200 K, where the habitable-zone model holds.",
  ),
  reason(
    16,
    "needs-card-magnitude",
    "input-missing",
    "needs magnitude",
    "The star has no magnitude in the passband of the instrument card.",
  ),
  reason(
    17,
    "too-bright",
    "out-of-range",
    "too bright",
    "The star is brighter than the instrument card measures: above its bright limit, or filling a pixel in one exposure.",
  ),
  reason(
    18,
    "too-faint",
    "out-of-range",
    "too faint",
    "The star is fainter than the faint limit of the instrument card.",
  ),
  reason(
    19,
    "too-few-transits",
    "out-of-range",
    "few transits",
    "Fewer transits fit into the campaign than it asks for.",
  ),
  reason(
    20,
    "needs-orbit",
    "input-missing",
    "needs orbit",
    "The orbit where the insolation is Earth's is blank.",
  ),
  reason(
    21,
    "needs-noise",
    "input-missing",
    "needs noise",
    "The noise of the instrument on this star is blank.",
  ),
  reason(
    22,
    "not-dwarf-like",
    "out-of-range",
    "not a dwarf",
    "The star is too bright or its gravity too low for a dwarf; dwarf relations do not hold.",
  ),
  reason(23, "held", "held", "held", "The value is held until a question about it is answered."),
  reason(24, "withheld", "withheld", "withheld", "The value is not shown to you."),
  reason(25, "orbit-inside-star", "out-of-range", "inside star", "The orbit would lie inside the star."),
  reason(
    26,
    "needs-error",
    "input-missing",
    "no error given",
    "An input has no error, so this one has none.",
  ),
  reason(
    27,
    "outside-light-share",
    "out-of-range",
    "out of range",
    "The light share is a fraction of the light, above 0 and at most 1; the one given is not.",
  ),
  reason(
    28,
    "not-finite",
    "out-of-range",
    "out of range",
    "The given values lead to no finite number; one of them is far from what a star can have.",
  ),
  reason(
    29,
    "outside-extinction",
    "out-of-range",
    "out of range",
    "The colour excess is negative, or the colour lies outside the range in which the extinction law has coefficients.",
  ),
  reason(
    30,
    "hotter-than-cool-dwarfs",
    "out-of-range",
    "too hot",
    "The star is hotter than the cool dwarfs for which the recipe uses the relations from M Ks.",
  ),
] as const satisfies readonly BlankReason[];

export type BlankKey = (typeof BLANK_REASONS)[number]["key"];

const byCode = new Map<number, BlankReason>(BLANK_REASONS.map((r) => [r.code, r]));
const byKey = new Map<string, BlankReason>(BLANK_REASONS.map((r) => [r.key, r]));

/** The reason of a stored code; an unknown code reads as "not given". */
export const blankReason = (code: number): BlankReason => byCode.get(code) ?? BLANK_REASONS[0];

/** The code of a reason by its key. */
export const blankCode = (key: BlankKey): number => byKey.get(key)?.code ?? 1;
