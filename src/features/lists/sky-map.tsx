import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import type { ListSky } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";
import { listSkyOptions } from "#src/api/lists.ts";
import { SKY_HEIGHT, SKY_WIDTH, SkyLabels, SkyNet, skyDot } from "#src/lib/sky-net.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";

const dots = (points: ListSky["points"]): string => points.map(([ra, dec]) => skyDot(ra, dec)).join("");

const Points = ({ points }: { points: ListSky["points"] }) => {
  const path = useMemo(() => dots(points), [points]);
  return (
    <path
      d={path}
      stroke="var(--star)"
      strokeWidth={points.length > 2000 ? 1.2 : 2.6}
      strokeLinecap="round"
      opacity={0.8}
    />
  );
};

const SHADES = 5;

/** Cells in a few steps of darkness, by the logarithm of their number of stars. */
const Cells = ({ cells }: { cells: ListSky["cells"] }) => {
  const paths = useMemo(() => {
    const most = Math.log(1 + Math.max(1, ...cells.map(([, , stars]) => stars)));
    const shade = (stars: number): number =>
      Math.min(SHADES - 1, Math.floor((SHADES * Math.log(1 + stars)) / most));
    return Array.from({ length: SHADES }, (_, step) =>
      cells
        .filter(([, , stars]) => shade(stars) === step)
        .map(([ra, dec]) => skyDot(ra, dec))
        .join(""),
    );
  }, [cells]);
  return (
    <g stroke="var(--star)" strokeWidth={3.4} strokeLinecap="square">
      {paths.map((path, step) => (
        <path key={path.slice(0, 20) || step} d={path} opacity={(step + 1) / SHADES} />
      ))}
    </g>
  );
};

/** The picture in words: how many lie in each half of the sky. */
const summaryOf = (sky: ListSky): string => {
  const all = [
    ...sky.points.map(([, dec]) => [dec, 1] as const),
    ...sky.cells.map(([, dec, n]) => [dec, n] as const),
  ];
  const north = all.reduce((sum, [dec, n]) => sum + (dec >= 0 ? n : 0), 0);
  const drawn = all.reduce((sum, [, n]) => sum + n, 0);
  return `${count(drawn)} stars on the sky: ${count(north)} north of the equator, ${count(drawn - north)} south.`;
};

/** Where the stars of a list are: an equal-area map with right ascension growing to the left. */
export const SkyMap = ({ programmeId, listId }: { programmeId: string; listId: string }) => {
  const { data: sky, error, refetch } = useQuery(listSkyOptions(programmeId, listId));
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
  if (!sky) return <Loading what="Reading the positions" />;
  return (
    <figure>
      <svg
        viewBox={`0 0 ${SKY_WIDTH} ${SKY_HEIGHT}`}
        className="mt-2 w-full"
        role="img"
        aria-label={summaryOf(sky)}
      >
        <SkyNet />
        {sky.cells.length > 0 ? <Cells cells={sky.cells} /> : <Points points={sky.points} />}
        <SkyLabels />
      </svg>
      <figcaption className="text-xs text-soft">
        {summaryOf(sky)} Right ascension and declination in degrees (ICRS).
        {sky.cells.length > 0 ? " Counted in cells of equal area; darker holds more." : ""}
        {sky.without > 0 ? ` ${count(sky.without)} have no position.` : ""}
      </figcaption>
    </figure>
  );
};
