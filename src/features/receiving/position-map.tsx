import { useMemo } from "react";
import { count } from "#shared/format/numbers.ts";
import { SKY_HEIGHT, SKY_WIDTH, SkyLabels, SkyNet, skyDot } from "#src/lib/sky-net.tsx";

export type Point = readonly [ra: number, dec: number];

/** The picture in words: how many, and what part of the sky they lie in. */
export const skyWords = (points: readonly Point[]): string => {
  if (points.length === 0) return "No position could be read from the rows looked at.";
  let [low, high] = [90, -90];
  const strips = new Set<number>();
  for (const [ra, dec] of points) {
    low = Math.min(low, dec);
    high = Math.max(high, dec);
    strips.add(Math.floor((((ra % 360) + 360) % 360) / 15));
  }
  const degrees = (n: number): string => `${n < 0 ? "\u2212" : "+"}${Math.abs(n).toFixed(1)}°`;
  const spread =
    strips.size >= 20 ? "all around in right ascension" : `in ${strips.size} of 24 hours of right ascension`;
  return `${count(points.length)} sampled positions drawn, declination ${degrees(low)} to ${degrees(high)}, ${spread}.`;
};

interface Props {
  points: readonly Point[];
  title?: string;
  isSmall?: boolean;
}

/** Where sampled positions fall: an equal-area map, right ascension growing to the left. */
export const PositionMap = ({ points, title, isSmall = false }: Props) => {
  const path = useMemo(() => points.map(([ra, dec]) => skyDot(ra, dec)).join(""), [points]);
  const words = skyWords(points);
  return (
    <figure>
      {title ? (
        <p className="mb-1 text-[11px] font-semibold tracking-[0.09em] text-soft uppercase">{title}</p>
      ) : null}
      <svg
        viewBox={`0 0 ${SKY_WIDTH} ${SKY_HEIGHT}`}
        className="w-full"
        role="img"
        aria-label={title ? `${title}: ${words}` : words}
      >
        <SkyNet />
        <path
          d={path}
          stroke="var(--star)"
          strokeWidth={isSmall ? 3.2 : 2.4}
          strokeLinecap="round"
          opacity={0.8}
        />
        {isSmall ? null : <SkyLabels />}
      </svg>
      <figcaption className="text-xs text-soft">{words}</figcaption>
    </figure>
  );
};
