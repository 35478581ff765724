import {
  DWARF_BRIGHTNESS_MARGIN,
  DWARF_LEAST_LOGG,
  mainSequenceAbsG,
} from "#shared/science/main-sequence.ts";
import type { Scratch } from "./scratch.ts";

/** Hotter stars take their radius from light and temperature even where M_Ks would allow the relation, K. */
const HOTTEST_COOL_DWARF_K = 4200;

/** A low gravity or a place above the main sequence rules a dwarf out. With neither known it cannot be told. */
export const judgeDwarf = (star: Scratch): void => {
  const brightest = mainSequenceAbsG(star.bpRp) - DWARF_BRIGHTNESS_MARGIN;
  star.isNotDwarf = (star.hasLogg && star.logg < DWARF_LEAST_LOGG) || star.absG < brightest;
  star.isDwarf = !star.isNotDwarf && (star.hasLogg || star.absG >= brightest);
};

/** Whether the relations for cool dwarfs may serve; a star of unknown temperature is judged by M_Ks alone. */
export const isCool = (star: Scratch): boolean => !star.isNotDwarf && !(star.teff > HOTTEST_COOL_DWARF_K);
