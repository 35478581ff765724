/** Why an expression is not taken: what and why, what to do, and where it stands (from 0) when that is known. */
export interface Refusal {
  readonly message: string;
  readonly hint: string;
  readonly position: number | null;
}

/** Thrown while a tree is made and caught where parsing began; it leaves this folder as a plain answer. */
export class Refused extends Error {
  constructor(readonly refusal: Refusal) {
    super(refusal.message);
  }
}

export const refuse = (message: string, hint: string, position: number | null = null): never => {
  throw new Refused({ message, hint, position });
};

export const refuseDepth = (): never =>
  refuse(
    "This expression is nested too deeply.",
    "Split it into several cuts, or write it with fewer brackets and choices.",
  );
