import { hammer, meridian, parallel } from "./projection.ts";

export const SKY_WIDTH = 420;
export const SKY_HEIGHT = 222;
const HALF = 98;
const CENTRE = [SKY_WIDTH / 2, SKY_HEIGHT / 2] as const;

const onPaper = ([x, y]: readonly [number, number]): readonly [number, number] => [
  CENTRE[0] + HALF * x,
  CENTRE[1] - HALF * y,
];
const text = (point: readonly [number, number]): string =>
  onPaper(point)
    .map((n) => n.toFixed(1))
    .join(",");

/** A dot on the map, as a piece of a path: many dots are one line of no length each, one element however many. */
export const skyDot = (ra: number, dec: number): string => `M${text(hammer(ra, dec))}h0`;

const PARALLELS = [-60, -30, 0, 30, 60];
const MERIDIANS = [60, 120, 180, 240, 300];

/** The lines of the equal-area map, right ascension growing to the left. */
export const SkyNet = () => (
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

/** Degrees on the lines; drawn over the stars. */
export const SkyLabels = ({ size = 8.5 }: { size?: number }) => (
  <g className="fill-soft font-mono" fontSize={size} textAnchor="middle">
    {MERIDIANS.map((ra) => {
      const [x, y] = onPaper(hammer(ra, 0));
      return (
        <text key={ra} x={x} y={y + size} stroke="var(--sheet)" strokeWidth={2.5} paintOrder="stroke">
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
