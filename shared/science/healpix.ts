import { isLatitude, RADIANS_PER_DEGREE, wrapDegrees } from "./angles.ts";

/**
 * Equal-area pixels of the sphere: Górski et al. 2005, ApJ 622, 759. Twelve base pixels ("faces"), each a square of
 * 2^order × 2^order pixels with x to the north-east and y to the north-west. A nested index interleaves the bits of x and
 * y below the face; a ring index counts along the parallels from the north pole.
 *
 * Indices are plain numbers, so the order ends at 24 (pixels of 0.013″): beyond it they are not exact.
 */

/** The deepest order whose indices are exact as numbers: 12 × 4^24 < 2^53. */
export const DEEPEST_ORDER = 24;

/** Ring of a face's southern corner, in units of the side; longitude of its centre line, in units of 45°. */
const FACE_RING = [2, 2, 2, 2, 3, 3, 3, 3, 4, 4, 4, 4];
const FACE_LONGITUDE = [1, 3, 5, 7, 0, 2, 4, 6, 1, 3, 5, 7];

/** Where a pixel lies: its face and its place in the face's square. */
export interface Place {
  face: number;
  x: number;
  y: number;
}

/** Whether indices of that depth exist and are exact. */
export const isOrder = (order: number): boolean =>
  Number.isInteger(order) && order >= 0 && order <= DEEPEST_ORDER;

/** Whether a pixel of that depth has the index. */
export const isPixel = (order: number, pixel: number): boolean =>
  isOrder(order) && Number.isInteger(pixel) && pixel >= 0 && pixel < 12 * 4 ** order;

/** Spreads the lower 16 bits to the even places. */
const spread = (bits: number): number => {
  let v = bits & 0xffff;
  v = (v | (v << 8)) & 0x00ff00ff;
  v = (v | (v << 4)) & 0x0f0f0f0f;
  v = (v | (v << 2)) & 0x33333333;
  return (v | (v << 1)) & 0x55555555;
};

/** Gathers the bits at the even places: the inverse of {@link spread}. */
const gather = (bits: number): number => {
  let v = bits & 0x55555555;
  v = (v | (v >>> 1)) & 0x33333333;
  v = (v | (v >>> 2)) & 0x0f0f0f0f;
  v = (v | (v >>> 4)) & 0x00ff00ff;
  return (v | (v >>> 8)) & 0xffff;
};

const HALF = 2 ** 32;

/**
 * Nested index of a place. Bits are worked on 32 at a time, as JavaScript does; the upper half goes above 2^32 by
 * multiplication.
 */
export const nestedOf = (order: number, face: number, x: number, y: number): number => {
  const low = (spread(x) | (spread(y) << 1)) >>> 0;
  const high = (spread(x >>> 16) | (spread(y >>> 16) << 1)) >>> 0;
  return face * 4 ** order + high * HALF + low;
};

/** Place of a nested index: the inverse of {@link nestedOf}. */
export const placeOf = (order: number, nested: number): Place => {
  const area = 4 ** order;
  const face = Math.floor(nested / area);
  const within = nested - face * area;
  const high = Math.floor(within / HALF);
  const low = within - high * HALF;
  return {
    face,
    x: gather(low) | (gather(high) << 16),
    y: gather(low >>> 1) | (gather(high >>> 1) << 16),
  };
};

const ringOf = (order: number, face: number, x: number, y: number): number => {
  const side = 2 ** order;
  const ring = (FACE_RING[face] ?? Number.NaN) * side - x - y - 1;
  const across = FACE_LONGITUDE[face] ?? Number.NaN;
  const toSouth = 4 * side - ring;
  const isNorth = ring < side;
  const isSouth = toSouth < side;
  const quarter = isNorth ? ring : isSouth ? toSouth : side;
  const shift = isNorth || isSouth ? 0 : (ring - side) % 2;
  const before = isNorth
    ? 2 * ring * (ring - 1)
    : isSouth
      ? 12 * side * side - 2 * (toSouth + 1) * toSouth
      : 2 * side * (side - 1) + (ring - side) * 4 * side;
  const along = (across * quarter + x - y + 1 + shift) / 2;
  const around = 4 * side;
  return before - 1 + (along > around ? along - around : along < 1 ? along + around : along);
};

type Numbering = (order: number, face: number, x: number, y: number) => number;

const pixelAt = (number: Numbering, order: number, longitude: number, latitude: number): number => {
  if (!isOrder(order) || !isLatitude(latitude) || !Number.isFinite(longitude)) return Number.NaN;
  const side = 2 ** order;
  const z = Math.sin(latitude * RADIANS_PER_DEGREE);
  const quarters = wrapDegrees(longitude) / 90;
  return Math.abs(z) <= 2 / 3
    ? equatorialPixel(number, order, side, z, quarters)
    : polarPixel(number, order, side, z, Math.cos(latitude * RADIANS_PER_DEGREE), quarters);
};

const equatorialPixel = (
  number: Numbering,
  order: number,
  side: number,
  z: number,
  quarters: number,
): number => {
  // Lines that rise and that fall to the east are counted; where they cross tells face and pixel.
  const rising = Math.floor(side * (0.5 + quarters - 0.75 * z));
  const falling = Math.floor(side * (0.5 + quarters + 0.75 * z));
  const risingFace = Math.floor(rising / side);
  const fallingFace = Math.floor(falling / side);
  const face =
    risingFace === fallingFace
      ? (risingFace % 4) + 4
      : risingFace < fallingFace
        ? risingFace % 4
        : (fallingFace % 4) + 8;
  return number(order, face, falling % side, side - 1 - (rising % side));
};

const polarPixel = (
  number: Numbering,
  order: number,
  side: number,
  z: number,
  cosine: number,
  quarters: number,
): number => {
  const quarter = Math.min(3, Math.floor(quarters));
  const part = quarters - quarter;
  // √(3 (1 − |z|)) by way of the cosine, as 1 − |z| has no digits left near the pole.
  const reach = side * cosine * Math.sqrt(3 / (1 + Math.abs(z)));
  const rising = Math.min(side - 1, Math.floor(part * reach));
  const falling = Math.min(side - 1, Math.floor((1 - part) * reach));
  return z > 0
    ? number(order, quarter, side - 1 - falling, side - 1 - rising)
    : number(order, quarter + 8, rising, falling);
};

/**
 * Nested index of the pixel that holds a position.
 *
 * @param order depth, 0 to {@link DEEPEST_ORDER}; the side of a face is 2^order pixels. NaN is returned outside
 * @param longitude degrees; @param latitude degrees; NaN is returned beyond ±90°
 */
export const nestedPixel = (order: number, longitude: number, latitude: number): number =>
  pixelAt(nestedOf, order, longitude, latitude);

/** Ring index of the pixel that holds a position; arguments as for {@link nestedPixel}. */
export const ringPixel = (order: number, longitude: number, latitude: number): number =>
  pixelAt(ringOf, order, longitude, latitude);

/**
 * Writes longitude and latitude, degrees, of the centre of a nested pixel; NaN when there is no such pixel.
 *
 * @param target receives the longitude at 0 and the latitude at 1
 */
export const nestedCentre = (target: Float64Array, order: number, pixel: number): void => {
  target[0] = Number.NaN;
  target[1] = Number.NaN;
  if (!isPixel(order, pixel)) return;
  const { face, x, y } = placeOf(order, pixel);
  const side = 2 ** order;
  const ring = (FACE_RING[face] ?? Number.NaN) * side - x - y - 1;
  const toPole = Math.min(ring, 4 * side - ring);
  const quarter = Math.min(toPole, side);
  const across = (FACE_LONGITUDE[face] ?? Number.NaN) * quarter + x - y;
  target[0] = wrapDegrees((45 * across) / quarter);
  target[1] = ringLatitude(side, ring, toPole);
};

/** Latitude of a ring, degrees. */
const ringLatitude = (side: number, ring: number, toPole: number): number => {
  if (toPole >= side) return Math.asin((2 * (2 * side - ring)) / (3 * side)) / RADIANS_PER_DEGREE;
  // 1 − |z|; the latitude comes from it by the half angle, as the arcsine has no digits near the pole.
  const missing = toPole ** 2 / (3 * side ** 2);
  const fromPole = (2 * Math.asin(Math.sqrt(missing / 2))) / RADIANS_PER_DEGREE;
  return ring < 2 * side ? 90 - fromPole : fromPole - 90;
};

/**
 * Pixel of order 12 that is coded in a 64-bit source number of a space astrometry catalogue: `⌊id / 2^35⌋`, nested, ICRS
 * (common practice, no source). It is where the star was when it was numbered: no position is to be made from it.
 *
 * @param id digits, as such numbers are beyond what a number holds exactly; NaN is returned for anything else
 */
export const pixelOfSourceNumber = (id: string): number => {
  if (!/^\d{1,19}$/.test(id)) return Number.NaN;
  const pixel = Number(BigInt(id) >> 35n);
  return isPixel(12, pixel) ? pixel : Number.NaN;
};
