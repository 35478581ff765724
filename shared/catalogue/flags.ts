/** Warnings a star carries, one bit each. Bits are stored, so a bit never changes its meaning. */
export interface Flag {
  readonly bit: number;
  readonly key: string;
  /** In the cell and on the star sheet. */
  readonly word: string;
  readonly sentence: string;
  /** Whether it counts among the star's flags; marks that only inform do not. */
  readonly isWarning: boolean;
}

export const FLAGS = [
  {
    bit: 1,
    key: "maybe-two-stars",
    word: "maybe two stars",
    sentence:
      "The astrometric fit is worse than the limit of the recipe; an unseen companion is likely. A good fit does not prove a single star.",
    isWarning: true,
  },
  {
    bit: 2,
    key: "shared-light",
    word: "shared light",
    sentence:
      "Less than 98 % of the light in the aperture is the star's own; planets look smaller than they are.",
    isWarning: true,
  },
  {
    bit: 4,
    key: "not-dwarf-like",
    word: "not dwarf-like",
    sentence:
      "Its gravity is low, or it is more than a magnitude brighter than the main sequence at its colour: the relations for dwarfs are not used.",
    isWarning: true,
  },
  {
    bit: 8,
    key: "assumed",
    word: "assumed",
    sentence:
      "Gravity or iron content was not given and was assumed, as the recipe says; the errors of what rests on it are the wider for it.",
    isWarning: false,
  },
] as const satisfies readonly Flag[];

export type FlagKey = (typeof FLAGS)[number]["key"];

const bits = new Map<string, number>(FLAGS.map((flag) => [flag.key, flag.bit]));

export const flagBit = (key: FlagKey): number => bits.get(key) ?? 0;

/** The flags set in those bits. */
export const flagsIn = (value: number): readonly Flag[] => FLAGS.filter((flag) => (value & flag.bit) !== 0);

/** How many of the bits are warnings. */
export const countWarnings = (value: number): number => {
  let count = 0;
  for (const flag of FLAGS) if (flag.isWarning && (value & flag.bit) !== 0) count++;
  return count;
};
