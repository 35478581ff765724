/**
 * Limits that pointing lists customarily keep, as defaults for a person to change: none is a law. Common practice, no
 * source, where none is named.
 */
export const CUSTOMARY_LIMITS = {
  /** Altitude of the Sun's centre at which twilight of a kind ends, degrees; by definition. */
  twilight: { civil: -6, nautical: -12, astronomical: -18 },
  /** Altitude of the Sun below which photometry begins, degrees; bright targets and others. */
  photometrySunAltitude: { bright: -12, faint: -18 },
  airmass: { preferred: 1.5, greatest: 2 },
  /** Degrees. */
  leastAltitude: 30,
  /** Degrees; in low orbit, and from the ground through twilight and airmass. */
  leastSunElongation: { space: 50, ground: 45 },
  /** Elongations that a sunshield leaves open, degrees. */
  fieldOfRegard: { least: 85, most: 135 },
  /** Least distance from the Moon by its illumination class, degrees. */
  moonSeparation: { dark: 20, grey: 30, bright: 45 },
  /** Illuminated fraction up to which the sky counts as dark, and from which as bright (classes in common use for planning). */
  moonIllumination: { dark: 0.25, bright: 0.65 },
  /** Distance from the ecliptic below which asteroids, zodiacal light and planets are a nuisance, degrees. */
  eclipticLatitude: 10,
  /** Distance from the galactic plane below which a field counts as crowded, degrees. */
  galacticLatitude: 15,
  /** A planet brighter than the magnitude within the distance (degrees) is worth a warning. */
  planet: { magnitude: 3, separation: 5 },
  /** Light of all neighbours in the aperture over the target's own, from which they are worth a warning. */
  neighbourLight: 0.01,
  /** Radius of the wings of an image in which a brighter star is worth a warning, pixels. */
  wingRadius: 10,
} as const;

/** How much the Moon lights the sky. */
export type MoonClass = "dark" | "grey" | "bright";

/** Class of an illuminated fraction, 0 to 1: dark up to 0.25, bright from 0.65; null outside 0 to 1. */
export const moonClass = (illuminated: number): MoonClass | null => {
  if (!(illuminated >= 0 && illuminated <= 1)) return null;
  if (illuminated <= CUSTOMARY_LIMITS.moonIllumination.dark) return "dark";
  return illuminated >= CUSTOMARY_LIMITS.moonIllumination.bright ? "bright" : "grey";
};
