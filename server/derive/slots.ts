import { type BlankKey, blankCode } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, errorKey } from "#shared/catalogue/columns.ts";
import { type MethodKey, methodCode } from "#shared/catalogue/methods.ts";
import { STELLAR_KEYS, type StellarColumns, type StellarKey } from "./star-columns.ts";

/** One derived quantity's columns. A cell gets either a value with its error or the reason why it is blank. */
export class Slot {
  constructor(
    private readonly values: Float64Array,
    private readonly errors: Float64Array,
    private readonly blanks: Uint8Array,
    private readonly methods: Uint8Array,
  ) {}

  /** A number that is not finite, from a given value far out of bounds, is no value: the database holds none either. */
  value(i: number, value: number, error: number): void {
    if (!Number.isFinite(value)) {
      this.blank(i, "not-finite");
      return;
    }
    this.values[i] = value;
    this.errors[i] = Number.isFinite(error) ? error : Number.NaN;
  }

  blank(i: number, reason: BlankKey): void {
    this.blanks[i] = blankCode(reason);
  }

  /** Leaves the cell blank for the reason that another quantity has. */
  blankLike(i: number, other: Slot): void {
    this.blanks[i] = other.blanks[i] ?? 0;
  }

  isBlank(i: number): boolean {
    return this.blanks[i] !== 0;
  }

  method(i: number, method: MethodKey): void {
    this.methods[i] = methodCode(method);
  }
}

export type Slots = Readonly<Record<StellarKey, Slot>>;

const NO_METHODS = new Uint8Array(0);

export const slotsOf = ({ values, blanks, methods }: StellarColumns): Slots =>
  Object.fromEntries(
    STELLAR_KEYS.map((key) => [
      key,
      new Slot(
        values[key] as Float64Array,
        values[errorKey(key)] as Float64Array,
        blanks[blankKey(key)] as Uint8Array,
        methods[`${key}_method`] ?? NO_METHODS,
      ),
    ]),
  ) as Slots;
