/** Settings of an instrument card and of a campaign, as the science uses them. */
import type { MagnitudeSystem, PhotonBandKey } from "./passbands.ts";
import type { ScintillationLaw } from "./scintillation.ts";

/**
 * Noise by a published or measured curve: three terms in ppm per hour at the reference magnitude, added in
 * quadrature, growing as 10^(0.2 Δm), 10^(0.4 Δm) and not at all.
 */
export interface FormulaCard {
  readonly model: "formula";
  /** Key of the catalogue column that holds the star's magnitude in the instrument's passband. */
  readonly passband: string;
  readonly referenceMagnitude: number;
  /** Photon noise at the reference magnitude, ppm in one hour. */
  readonly photonPpm: number;
  /** Background noise at the reference magnitude, ppm in one hour. */
  readonly backgroundPpm: number;
  /** Floor that does not depend on the star, ppm in one hour. */
  readonly floorPpm: number;
  /** Limits of use, mag: brighter saturates, fainter is not measured. */
  readonly brightLimit: number;
  readonly faintLimit: number;
}

/** Noise by the CCD equation from the telescope and its detector. */
export interface DetectorCard {
  readonly model: "detector";
  readonly passband: string;
  /** Band of the photon rate. */
  readonly photonBand: PhotonBandKey;
  /** Diameter of the aperture, m. */
  readonly apertureM: number;
  /** Diameter of the central obstruction over that of the aperture. */
  readonly obstruction: number;
  /** Optics × filter peak × quantum efficiency. */
  readonly throughput: number;
  /** Extinction, mag per airmass; 0 in space. */
  readonly extinction: number;
  readonly airmass: number;
  /** Altitude of the site, m; null in space, where nothing scintillates. */
  readonly siteAltitudeM: number | null;
  /** Arcseconds per pixel. */
  readonly pixelScale: number;
  /** Radius of the photometric aperture, pixels. */
  readonly apertureRadiusPx: number;
  /** Pixels of the annulus in which the sky is measured. */
  readonly skyPixels: number;
  /** Electrons, rms, per pixel and reading. */
  readonly readNoise: number;
  /** Electrons per pixel and second. */
  readonly darkRate: number;
  /** Electrons a pixel holds. */
  readonly fullWell: number;
  /** Full width at half maximum of a star's image, pixels. */
  readonly fwhmPx: number;
  /** Brightness of the sky in the passband, mag per square arcsecond. */
  readonly skyBrightness: number;
  readonly exposureS: number;
  /** Time between exposures, s. */
  readonly overheadS: number;
  /** Red-noise floor, ppm, that does not average down within an hour. */
  readonly floorPpm: number;
  readonly brightLimit: number;
  readonly faintLimit: number;
  /** System of the star's and the sky's magnitudes; Vega where absent. */
  readonly magnitudeSystem?: MagnitudeSystem;
  /** Electrons per count; 1 where absent. */
  readonly gain?: number;
  /** Digitisation error, counts rms; 0.289 is that of rounding, none where absent. */
  readonly digitisation?: number;
  /** Largest number that the converter writes; with the gain, a limit beside the full well. */
  readonly mostCounts?: number;
  /** Law of scintillation; Young's where absent. */
  readonly scintillationLaw?: ScintillationLaw;
  /** Site coefficient C_Y of Osborn's law; its customary 1.5 where absent. */
  readonly scintillationCoefficient?: number;
  /** Equal comparison stars of a differential light curve; where absent, the comparison adds no noise. */
  readonly comparisonStars?: number;
  /** Noise of pointing and guiding in one exposure, ppm; it averages down as photon noise does. */
  readonly jitterPpm?: number;
  /** Noise that the points of one transit share, ppm: it averages down over transits, but not within one. */
  readonly redNoisePpm?: number;
}

export type CardSettings = FormulaCard | DetectorCard;

/** What the observing assumes. */
export interface CampaignSettings {
  readonly lengthDays: number;
  /** Share of the time that is observed, above 0 to 1. */
  readonly duty: number;
  /** Transits that must fall into the campaign for a detection to count. */
  readonly leastTransits: number;
  /** Signal-to-noise ratio at which a planet counts as found. */
  readonly snrLimit: number;
  /** Whether the signal is weighed as a box of the full duration or as a trapezoid. */
  readonly statistic: "boxcar" | "trapezoid";
}
