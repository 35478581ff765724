import type { ListSky } from "#shared/api/lists.ts";
import { LIMITS } from "#shared/limits.ts";
import type { Deps } from "../deps.ts";
import { findPositions } from "./queries.ts";
import { readList } from "./service.ts";

/** Cells of a map: steps in right ascension by steps in the sine of the declination, so that all are of one area. */
const RA_CELLS = 120;
const SINE_CELLS = 60;
const DEG = Math.PI / 180;

const step = (share: number, steps: number): number => Math.min(steps - 1, Math.floor(share * steps));

/** Counts positions in cells of equal area. */
export const countInCells = (points: ListSky["points"]): ListSky["cells"] => {
  const counts = new Map<number, number>();
  for (const [ra, dec] of points) {
    const column = step((((ra % 360) + 360) % 360) / 360, RA_CELLS);
    const row = step((1 + Math.sin(dec * DEG)) / 2, SINE_CELLS);
    const cell = row * RA_CELLS + column;
    counts.set(cell, (counts.get(cell) ?? 0) + 1);
  }
  return [...counts].map(([cell, stars]) => {
    const row = Math.floor(cell / RA_CELLS);
    const ra = (((cell % RA_CELLS) + 0.5) * 360) / RA_CELLS;
    return [ra, Math.asin((2 * (row + 0.5)) / SINE_CELLS - 1) / DEG, stars];
  });
};

/** Where the stars of a list are, at the values they were put there on. */
export const readSky = async (deps: Deps, programmeId: string, listId: string): Promise<ListSky> => {
  await readList(deps, programmeId, listId);
  const positions = await findPositions(deps.db.manager, listId);
  const points = positions.flatMap(({ ra, declination }): ListSky["points"] =>
    ra === null || declination === null ? [] : [[Number(ra), Number(declination)]],
  );
  const isMany = points.length > LIMITS.skyPoints;
  return {
    stars: positions.length,
    without: positions.length - points.length,
    points: isMany ? [] : points,
    cells: isMany ? countInCells(points) : [],
  };
};
