import { type BlankKey, blankCode } from "#shared/catalogue/blank-reasons.ts";
import { type MethodKey, methodCode } from "#shared/catalogue/methods.ts";
import { STELLAR_KEYS, type StellarColumns } from "./star-columns.ts";

interface Slot {
  readonly values: Float64Array;
  readonly errors: Float64Array;
  readonly blanks: Uint8Array;
  readonly methods: Uint8Array;
}

const NO_METHODS = new Uint8Array(0);

/** Writes the quantities of one star after another into columns. The arrays are looked up once, not per star. */
export class Writer {
  private at = 0;
  private readonly slots: Readonly<Record<string, Slot>>;

  constructor({ values, blanks, methods }: StellarColumns) {
    this.slots = Object.fromEntries(
      STELLAR_KEYS.map((key) => [
        key,
        {
          values: values[key] as Float64Array,
          errors: values[`${key}_err`] as Float64Array,
          blanks: blanks[`${key}_blank`] as Uint8Array,
          methods: methods[`${key}_method`] ?? NO_METHODS,
        },
      ]),
    );
  }

  moveTo(index: number): void {
    this.at = index;
  }

  value(key: string, value: number, error: number): void {
    const slot = this.slot(key);
    slot.values[this.at] = value;
    slot.errors[this.at] = error;
  }

  blank(key: string, reason: BlankKey): void {
    this.blankByCode(key, blankCode(reason));
  }

  blankByCode(key: string, code: number): void {
    this.slot(key).blanks[this.at] = code;
  }

  /** Blank code written for the present star; 0 where it has the value. */
  blankOf(key: string): number {
    return this.slot(key).blanks[this.at] ?? 0;
  }

  method(key: string, method: MethodKey): void {
    this.slot(key).methods[this.at] = methodCode(method);
  }

  private slot(key: string): Slot {
    const slot = this.slots[key];
    if (!slot) throw new RangeError(`No stellar column is called ${key}.`);
    return slot;
  }
}
