import { type BlankKey, blankCode } from "#shared/catalogue/blank-reasons.ts";
import { blankKey, errorKey } from "#shared/catalogue/columns.ts";
import { type MethodKey, methodCode } from "#shared/catalogue/methods.ts";
import { type ErrorVector, relativeError } from "./relative-error.ts";
import { STELLAR_KEYS, type StellarColumns, type StellarKey } from "./star-columns.ts";

/** One derived quantity's columns. A cell gets either a value with its error or the reason why it is blank. */
export class Slot {
  constructor(
    private readonly values: Float64Array,
    private readonly errors: Float64Array,
    private readonly blanks: Uint8Array,
    private readonly methods: Uint8Array,
  ) {}

  /**
   * A value with its vector of relative errors. A number that is not finite, from a given value far out of bounds, is no
   * value: the database holds none either.
   */
  value(i: number, value: number, errors: ErrorVector): void {
    this.put(i, value, Math.abs(value) * relativeError(errors));
  }

  /** A value as it was given, with its own error to the last digit. */
  given(i: number, value: number, error: number): void {
    this.put(i, value, error);
  }

  /** A magnitude, whose vector holds magnitudes. */
  magnitude(i: number, value: number, errors: ErrorVector): void {
    this.put(i, value, relativeError(errors));
  }

  private put(i: number, value: number, error: number): void {
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

  method(i: number, method: MethodKey | null): void {
    if (method !== null) this.methods[i] = methodCode(method);
  }
}

export type Slots = Readonly<Record<StellarKey, Slot>>;

const NO_METHODS = new Uint8Array(0);

const slotArguments = ({ values, blanks, methods }: StellarColumns, key: StellarKey) =>
  [
    values[key] as Float64Array,
    values[errorKey(key)] as Float64Array,
    blanks[blankKey(key)] as Uint8Array,
    methods[`${key}_method`] ?? NO_METHODS,
  ] as const;

export const slotsOf = (columns: StellarColumns): Slots =>
  Object.fromEntries(STELLAR_KEYS.map((key) => [key, new Slot(...slotArguments(columns, key))])) as Slots;

/** Keeps the error vector of each value, for the workings of one star. */
class RecordingSlot extends Slot {
  vector: Float64Array | null = null;

  override value(i: number, value: number, errors: ErrorVector): void {
    super.value(i, value, errors);
    this.vector = Float64Array.from(errors);
  }

  override magnitude(i: number, value: number, errors: ErrorVector): void {
    super.magnitude(i, value, errors);
    this.vector = Float64Array.from(errors);
  }
}

export type RecordingSlots = Readonly<Record<StellarKey, RecordingSlot>>;

export const recordingSlotsOf = (columns: StellarColumns): RecordingSlots =>
  Object.fromEntries(
    STELLAR_KEYS.map((key) => [key, new RecordingSlot(...slotArguments(columns, key))]),
  ) as RecordingSlots;
