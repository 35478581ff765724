import { RADIANS_PER_DEGREE } from "./angles.ts";
import { isOrder, isPixel, nestedCentre, nestedOf, nestedPixel, placeOf } from "./healpix.ts";
import { separation } from "./separation.ts";

/** Steps in x and y to the eight pixels around, from south-west clockwise. */
const STEPS = [
  [-1, 0],
  [-1, 1],
  [0, 1],
  [1, 1],
  [1, 0],
  [1, -1],
  [0, -1],
  [-1, -1],
] as const;

/**
 * The face beyond an edge or corner of each face; −1 where only three faces meet. Rows are the nine directions
 * 3 (1 + dy) + (1 + dx), columns the faces.
 */
const NEXT_FACE = [
  [8, 9, 10, 11, -1, -1, -1, -1, 10, 11, 8, 9],
  [5, 6, 7, 4, 8, 9, 10, 11, 9, 10, 11, 8],
  [-1, -1, -1, -1, 5, 6, 7, 4, -1, -1, -1, -1],
  [4, 5, 6, 7, 11, 8, 9, 10, 11, 8, 9, 10],
  [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11],
  [1, 2, 3, 0, 0, 1, 2, 3, 5, 6, 7, 4],
  [-1, -1, -1, -1, 7, 4, 5, 6, -1, -1, -1, -1],
  [3, 0, 1, 2, 3, 0, 1, 2, 4, 5, 6, 7],
  [2, 3, 0, 1, -1, -1, -1, -1, 0, 1, 2, 3],
] as const;

/**
 * How the axes of the next face lie when a polar cap is left through one of its own edges, by direction: 1 mirrors x,
 * 2 mirrors y, 4 swaps them. First for faces of the north, then of the south.
 */
const TURN_NORTH = [0, 0, 0, 0, 0, 5, 0, 6, 3] as const;
const TURN_SOUTH = [3, 6, 0, 5, 0, 0, 0, 0, 0] as const;

const turnOf = (face: number, direction: number): number => {
  if (face < 4) return TURN_NORTH[direction] ?? 0;
  return face < 8 ? 0 : (TURN_SOUTH[direction] ?? 0);
};

/** Index of the pixel a step away across the edge of a face; NaN when there is none. */
const across = (order: number, face: number, x: number, y: number): number => {
  const side = 2 ** order;
  const direction = 3 * (1 + Math.floor(y / side)) + (1 + Math.floor(x / side));
  const next = NEXT_FACE[direction]?.[face] ?? -1;
  if (next < 0) return Number.NaN;
  const turn = turnOf(face, direction);
  const u = (x + side) % side;
  const v = (y + side) % side;
  const mirroredX = turn & 1 ? side - 1 - u : u;
  const mirroredY = turn & 2 ? side - 1 - v : v;
  return turn & 4 ? nestedOf(order, next, mirroredY, mirroredX) : nestedOf(order, next, mirroredX, mirroredY);
};

/**
 * Nested indices of the pixels around one, in the order south-west, west, north-west, north, north-east, east, south-east,
 * south: eight, seven at the corners where three faces meet, fewer at order 0. Empty when there is no such pixel.
 *
 * @see Górski et al. 2005, ApJ 622, 759
 */
export const nestedNeighbours = (order: number, pixel: number): number[] => {
  if (!isPixel(order, pixel)) return [];
  const { face, x, y } = placeOf(order, pixel);
  return STEPS.map(([dx, dy]) => across(order, face, x + dx, y + dy)).filter((next) => !Number.isNaN(next));
};

/** Greatest distance from the centre of a pixel to one of its corners at an order, degrees. */
const pixelRadius = (order: number): number => {
  const side = 2 ** order;
  // The pixels that reach furthest stand at the poleward corner of the equatorial zone.
  const z = 1 - (1 - 1 / side) ** 2 / 3;
  return separation(45 / side, Math.asin(2 / 3) / RADIANS_PER_DEGREE, 0, Math.asin(z) / RADIANS_PER_DEGREE);
};

/** Room for rounding, degrees. */
const MARGIN = 1e-12;

/**
 * A disc up to this wide, degrees at order 0, stays within the pixel of its centre and the neighbours of that pixel: a
 * quarter of the mean side, and no pixel is half as narrow as the mean.
 */
const SURELY_WITHIN_NEIGHBOURS = 14;

/** Pixels that together hold the disc, of an order at which they are not many. */
const firstPixels = (
  order: number,
  longitude: number,
  latitude: number,
  radius: number,
): { depth: number; pixels: number[] } => {
  const depth = Math.min(order, Math.floor(Math.log2(SURELY_WITHIN_NEIGHBOURS / radius)));
  if (depth < 1) return { depth: 0, pixels: Array.from({ length: 12 }, (_, face) => face) };
  const pixel = nestedPixel(depth, longitude, latitude);
  return { depth, pixels: [pixel, ...nestedNeighbours(depth, pixel)].sort((a, b) => a - b) };
};

/**
 * Nested indices of all pixels that a disc touches, rising. A few that it only comes near are among them, and none is left
 * out: what is meant for a search, which measures the distances itself.
 *
 * @param order depth; @param longitude degrees; @param latitude degrees, −90 to 90
 * @param radius degrees, not negative
 * @returns empty when an argument is out of range
 */
export const pixelsTouchingDisc = (
  order: number,
  longitude: number,
  latitude: number,
  radius: number,
): number[] => {
  if (!isOrder(order) || !(radius >= 0)) return [];
  const centre = new Float64Array(2);
  const first = firstPixels(order, longitude, latitude, radius);
  let pixels = first.pixels;
  for (let depth = first.depth; depth <= order; depth++) {
    const reach = radius + pixelRadius(depth) + MARGIN;
    const kept = pixels.filter((pixel) => {
      nestedCentre(centre, depth, pixel);
      const [l = Number.NaN, b = Number.NaN] = centre;
      return separation(longitude, latitude, l, b) <= reach;
    });
    if (depth === order) return kept;
    pixels = kept.flatMap((pixel) => [4 * pixel, 4 * pixel + 1, 4 * pixel + 2, 4 * pixel + 3]);
  }
  return pixels;
};
