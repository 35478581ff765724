import { useQuery } from "@tanstack/react-query";
import { useMemo } from "react";
import type { ListSky } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";
import { listSkyOptions } from "#src/api/lists.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { hammer, meridian, parallel } from "./projection.ts";

const WIDTH = 420;
const HEIGHT = 222;
const HALF = 98;
const CENTRE = [WIDTH / 2, HEIGHT / 2] as const;

const onPaper = ([x, y]: readonly [number, number]): readonly [number, number] => [
  CENTRE[0] + HALF * x,
  CENTRE[1] - HALF * y,
];
const text = (point: readonly [number, number]): string =>
  onPaper(point)
    .map((n) => n.toFixed(1))
    .join(",");

const PARALLELS = [-60, -30, 0, 30, 60];
const MERIDIANS = [60, 120, 180, 240, 300];

const Net = () => (
  <g fill="none" stroke="var(--hair)">
    <ellipse cx={CENTRE[0]} cy={CENTRE[1]} rx={2 * HALF} ry={HALF} stroke="var(--rule)" />
    {PARALLELS.map((dec) => (
      <polyline key={`d${dec}`} points={parallel(dec).map(text).join(" ")} />
    ))}
    {MERIDIANS.map((ra) => (
      <polyline key={`r${ra}`} points={meridian(ra).map(text).join(" ")} />
    ))}
  </g>
);

const Labels = () => (
  <g className="fill-soft font-mono text-[8.5px]" textAnchor="middle">
    {MERIDIANS.map((ra) => {
      const [x, y] = onPaper(hammer(ra, 0));
      return (
        <text key={ra} x={x} y={y + 9} stroke="var(--sheet)" strokeWidth={2.5} paintOrder="stroke">
          {ra}°
        </text>
      );
    })}
    {[-60, -30, 30, 60].map((dec) => {
      const [x, y] = onPaper(hammer(359.999, dec));
      return (
        <text key={dec} x={x - 4} y={y + (dec > 0 ? -2 : 8)} textAnchor="end">
          {dec > 0 ? "+" : "−"}
          {Math.abs(dec)}°
        </text>
      );
    })}
  </g>
);

/** Many dots as one line of no length each: one element however many stars. */
const dots = (points: ListSky["points"]): string =>
  points.map(([ra, dec]) => `M${text(hammer(ra, dec))}h0`).join("");

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
        .map(([ra, dec]) => `M${text(hammer(ra, dec))}h0`)
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
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className="mt-2 w-full" role="img" aria-label={summaryOf(sky)}>
        <Net />
        {sky.cells.length > 0 ? <Cells cells={sky.cells} /> : <Points points={sky.points} />}
        <Labels />
      </svg>
      <figcaption className="text-xs text-soft">
        {summaryOf(sky)} Right ascension and declination in degrees (ICRS).
        {sky.cells.length > 0 ? " Counted in cells of equal area; darker holds more." : ""}
        {sky.without > 0 ? ` ${count(sky.without)} have no position.` : ""}
      </figcaption>
    </figure>
  );
};
