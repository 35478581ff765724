import { useId } from "react";
import { fixed } from "#shared/format/numbers.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { brightestUsable, noiseParts } from "#shared/science/noise.ts";
import { type Axes, axesOf, curve, magnitudeTicks, noiseTicks, PARTS, spread } from "./noise-series.ts";
import { useWidth } from "./use-width.ts";

const HEIGHT = 560;
const TOP = 30;
const BOTTOM = 44;
const LEFT = 62;
/** Room for the names at the ends of the lines. */
const RIGHT = 96;
const LABEL_ROOM = 16;

const scales = (axes: Axes, width: number) => ({
  x: (magnitude: number): number =>
    LEFT + ((magnitude - axes.least) / (axes.most - axes.least)) * (width - LEFT - RIGHT),
  y: (ppm: number): number =>
    HEIGHT - BOTTOM - (Math.log(ppm / axes.low) / Math.log(axes.high / axes.low)) * (HEIGHT - TOP - BOTTOM),
});
type Scales = ReturnType<typeof scales>;

const Frame = ({ axes, width, at }: { axes: Axes; width: number; at: Scales }) => (
  <g className="font-mono" fontSize="12" fill="var(--soft)">
    {noiseTicks(axes).map((tick) => (
      <g key={tick}>
        <line x1={LEFT} x2={width - RIGHT} y1={at.y(tick)} y2={at.y(tick)} stroke="var(--hair)" />
        <text x={LEFT - 8} y={at.y(tick) + 4} textAnchor="end">
          {tick < 1 ? String(Number(tick.toPrecision(1))) : fixed(tick, 0)}
        </text>
      </g>
    ))}
    {magnitudeTicks(axes).map((tick, i, all) =>
      width < 480 && i % 2 === 1 && all.length > 6 ? null : (
        <text key={tick} x={at.x(tick)} y={HEIGHT - BOTTOM + 20} textAnchor="middle">
          {fixed(tick, 0)}
        </text>
      ),
    )}
    <text x={LEFT} y={16}>
      noise, ppm in 1 h
    </text>
    <text x={width - RIGHT} y={HEIGHT - 6} textAnchor="end">
      magnitude
    </text>
  </g>
);

const Hatched = ({ from, to, words, hatch }: { from: number; to: number; words: string; hatch: string }) =>
  to - from < 1 ? null : (
    <g>
      <rect x={from} y={TOP} width={to - from} height={HEIGHT - TOP - BOTTOM} fill={`url(#${hatch})`} />
      {to - from > 64 ? (
        <text x={(from + to) / 2} y={TOP + 16} textAnchor="middle" fontSize="12" fill="var(--soft)">
          {words}
        </text>
      ) : null}
    </g>
  );

interface Line {
  part: (typeof PARTS)[number];
  points: [number, number][];
}

/** Each line's name at its right end, moved apart where ends lie close, with a hair between name and end. */
const Names = ({ lines, width, at }: { lines: readonly Line[]; width: number; at: Scales }) => {
  const ends = lines.map(({ points }): readonly [number, number] => points.at(-1) ?? [0, 1]);
  const places = spread(
    ends.map(([, ppm]) => at.y(ppm)),
    LABEL_ROOM,
    HEIGHT - BOTTOM,
  );
  return lines.map(({ part }, i) => {
    const place = places[i] ?? 0;
    const [magnitude, ppm] = ends[i] ?? [0, 1];
    return (
      <g key={part.key}>
        <line
          x1={at.x(magnitude) + 2}
          y1={at.y(ppm)}
          x2={width - RIGHT + 12}
          y2={place}
          stroke={part.color}
          strokeWidth="0.75"
        />
        <text x={width - RIGHT + 15} y={place + 4} fontSize="13" fill={part.color}>
          {part.label}
        </text>
      </g>
    );
  });
};

/** Noise against magnitude: the total and its parts, with what the card does not measure hatched. */
export const NoisePlot = ({ card, magnitude }: { card: CardSettings; magnitude: number }) => {
  const [place, width] = useWidth(800);
  const hatch = useId();
  const axes = axesOf(card);
  const at = scales(axes, width);
  const lines = PARTS.map((part) => ({ part, points: curve(card, part.key, axes) })).filter(
    ({ points }) => points.length > 1,
  );
  const right = width - RIGHT;
  const inside = (m: number): number => Math.min(right, Math.max(LEFT, at.x(m)));
  const brightest = brightestUsable(card);
  const total = noiseParts(card, magnitude).total;
  const isMarked =
    magnitude >= axes.least && magnitude <= axes.most && total >= axes.low && total <= axes.high;
  return (
    <div ref={place} className="w-full overflow-hidden">
      <svg
        width={width}
        height={HEIGHT}
        role="img"
        aria-label={`Noise in one hour against magnitude from ${axes.least} to ${axes.most}: ${lines.map(({ part }) => part.label).join(", ")}. The numbers stand in the table below.`}
      >
        <defs>
          <pattern
            id={hatch}
            width="6"
            height="6"
            patternTransform="rotate(45)"
            patternUnits="userSpaceOnUse"
          >
            <line x1="0" y1="0" x2="0" y2="6" stroke="var(--rule)" strokeWidth="2" />
          </pattern>
        </defs>
        {Number.isNaN(brightest) ? (
          <Hatched from={LEFT} to={right} words="not measured" hatch={hatch} />
        ) : (
          <>
            <Hatched from={LEFT} to={inside(brightest)} words="saturated" hatch={hatch} />
            <Hatched
              from={Math.max(inside(card.faintLimit), inside(brightest))}
              to={right}
              words="too faint"
              hatch={hatch}
            />
          </>
        )}
        <Frame axes={axes} width={width} at={at} />
        {lines.map(({ part, points }) => (
          <polyline
            key={part.key}
            points={points.map(([m, ppm]) => `${at.x(m).toFixed(1)},${at.y(ppm).toFixed(1)}`).join(" ")}
            fill="none"
            stroke={part.color}
            strokeWidth={part.width}
            strokeDasharray={part.dash || undefined}
          />
        ))}
        <Names lines={lines} width={width} at={at} />
        {isMarked ? <circle cx={at.x(magnitude)} cy={at.y(total)} r="5" fill="var(--mark)" /> : null}
      </svg>
    </div>
  );
};
