import { numberOf, wholeOf } from "./card.ts";
import type { FitsHeader } from "./header.ts";

/** physical = zero + scale × stored. */
export interface Scale {
  readonly scale: number;
  readonly zero: number;
  /** The zero with all its digits where the stored numbers are only moved by it, else null. */
  readonly shift: bigint | null;
}

/** TSCAL and TZERO of a column; null where they cannot be read or would make all values the same. */
export const readScale = (header: FitsHeader, place: number): Scale | null => {
  const scaleText = header.text(`TSCAL${place}`) ?? "1";
  const zeroText = header.text(`TZERO${place}`) ?? "0";
  const scale = numberOf(scaleText);
  const zero = numberOf(zeroText);
  if (!Number.isFinite(scale) || !Number.isFinite(zero) || scale === 0) return null;
  return { scale, zero, shift: scale === 1 ? wholeOf(zeroText) : null };
};

export const isScaled = (scale: Scale): boolean => scale.scale !== 1 || scale.zero !== 0;
