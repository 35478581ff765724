import { type InventedStar, inventedStar } from "./invented-star.ts";
import { Random } from "./random.ts";

/**
 * The two layouts of invented extracts, with the blemishes that real ones have. Lines are made one by one, so that an
 * extract may be of any size.
 */

export interface ExtractRange {
  readonly seed: number;
  /** Numbers of the first star and of the one after the last. */
  readonly from: number;
  readonly to: number;
}

const ASTROMETRY_HEADER =
  "source_id,designation,ra,dec,ref_epoch,parallax,parallax_error,pmra,pmra_error,pmdec,pmdec_error,g_mag,bp_mag,rp_mag,ks_mag,ks_mag_error,card_mag,ruwe";

/** Draws for blemishes stand apart from those of the star, so that clean and blemished extracts hold the same sky. */
const blemishes = (seed: number, index: number): Random => new Random(seed, index, 0xb1e);

const astrometryLine = (star: InventedStar, random: Random): string => {
  const hasParallax = !random.chance(0.012);
  // A faint star's parallax may come out negative: a measurement, not a mistake.
  const parallax = random.chance(0.006)
    ? -Math.abs(star.parallaxError * random.between(0.2, 2))
    : star.parallax;
  const hasMotion = !random.chance(0.003);
  const ksError = random.chance(0.01) ? "-999" : (0.018 + 0.004 * random.uniform()).toFixed(3);
  return [
    star.sourceId,
    star.designation,
    star.ra.toFixed(7),
    star.dec.toFixed(7),
    "2016.0",
    hasParallax ? parallax.toFixed(4) : "",
    hasParallax ? star.parallaxError.toFixed(4) : "",
    hasMotion ? star.pmra.toFixed(3) : "",
    hasMotion ? star.pmError.toFixed(3) : "",
    hasMotion ? star.pmdec.toFixed(3) : "",
    hasMotion ? star.pmError.toFixed(3) : "",
    star.g.toFixed(4),
    star.bp.toFixed(3),
    star.rp.toFixed(3),
    star.ks.toFixed(3),
    ksError,
    star.cardMag.toFixed(2),
    random.chance(0.02) ? "" : star.ruwe.toFixed(3),
  ].join(",");
};

const YEARS_BACK = 16;

/** Where the star stood at J2000.0. */
const earlier = (star: InventedStar): { ra: number; dec: number } => {
  const cos = Math.cos((star.dec * Math.PI) / 180);
  const back = (mas: number): number => (mas * YEARS_BACK) / 3_600_000;
  return {
    ra: (star.ra - back(star.pmra) / Math.max(cos, 1e-3) + 360) % 360,
    dec: Math.max(-90, Math.min(90, star.dec - back(star.pmdec))),
  };
};

const SPECTRA_HEADER =
  "Source;Name;RAdeg;DEdeg;Plx;e_Plx;Gmag;RPmag;Jmag;Hmag;Kmag;e_Kmag;Teff;e_Teff;logg;e_logg;[Fe/H];e_[Fe/H];LightShare";

const comma = (value: number, decimals: number): string => value.toFixed(decimals).replace(".", ",");

const spectraLine = (star: InventedStar, random: Random): string => {
  const { ra, dec } = earlier(star);
  const hasSpectrum = random.chance(0.55);
  return [
    star.sourceId,
    star.designation,
    comma(ra, 6),
    comma(dec, 6),
    comma(star.parallax + random.normal(0, star.parallaxError), 3),
    comma(star.parallaxError * 1.6, 3),
    random.chance(0.006) ? "99,99" : comma(star.g, 3),
    comma(star.rp, 3),
    comma(star.j, 3),
    comma(star.h, 3),
    comma(star.ks + random.normal(0, 0.01), 3),
    comma(0.02, 3),
    hasSpectrum ? comma(star.teff, 0) : "",
    hasSpectrum ? "60" : "",
    hasSpectrum ? comma(star.logg, 2) : "",
    hasSpectrum ? "0,08" : "",
    hasSpectrum ? comma(star.feh, 2) : "",
    hasSpectrum ? "0,06" : "",
    random.chance(0.3) ? "" : comma(star.lightShare, 3),
  ].join(";");
};

/** Lines that a damaged transfer left behind, by row: a field too few, a field too many. */
const damaged = (line: string, delimiter: string, row: number): string => {
  if (row === 4_117 || row === 9_002) return line.slice(0, line.lastIndexOf(delimiter));
  return row === 9_003 ? `${line}${delimiter}?` : line;
};

/** Every so many rows one stands twice. */
const REPEAT_EVERY = 2_500;

function* rows(
  range: ExtractRange,
  write: (star: InventedStar, random: Random) => string,
  delimiter: string,
): Generator<string> {
  for (let index = range.from; index < range.to; index++) {
    const line = write(inventedStar(range.seed, index), blemishes(range.seed, index));
    const row = index - range.from + 1;
    yield damaged(line, delimiter, row);
    if (row % REPEAT_EVERY === 0) yield line;
  }
}

/** Positions, motions and magnitudes at J2016.0; comma and decimal point. */
export function* astrometryExtract(range: ExtractRange): Generator<string> {
  yield ASTROMETRY_HEADER;
  yield* rows(range, astrometryLine, ",");
}

/** Magnitudes and spectra, positions at J2000.0 by its documentation; semicolon and decimal comma, with a byte-order mark. */
export function* spectraExtract(range: ExtractRange): Generator<string> {
  yield `\uFEFF${SPECTRA_HEADER}`;
  yield* rows(range, spectraLine, ";");
}
