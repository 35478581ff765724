import type { StarSheet } from "#shared/api/stars.ts";
import { fixed } from "#shared/format/numbers.ts";

const WIDTH = 352;
const HEIGHT = 132;
const LEFT = 24;
const RIGHT = 346;
const TOP = 14;
const BOTTOM = 106;
const RADII = [0.5, 1, 2, 4, 8];
const PERIODS = [1, 3, 10, 30, 100, 300];

/** Smallest planet by period, with the habitable zone's periods as a hatched band; both axes logarithmic. */
export const ReachPicture = ({ star }: { star: StarSheet }) => {
  const points = star.reach.flatMap(({ periodDays, rMin }) => (rMin === null ? [] : [{ periodDays, rMin }]));
  const first = star.reach[0]?.periodDays;
  const last = star.reach.at(-1)?.periodDays;
  if (points.length < 2 || first === undefined || last === undefined)
    return (
      <p className="text-xs text-soft">
        Not drawn: it needs an instrument and a campaign that can see this star.
      </p>
    );
  const low = 0.8 * Math.min(0.6, ...points.map((p) => p.rMin));
  const high = 1.25 * Math.max(2, ...points.map((p) => p.rMin));
  const x = (days: number): number =>
    LEFT + ((RIGHT - LEFT) * Math.log(days / first)) / Math.log(last / first);
  const y = (radius: number): number =>
    BOTTOM - ((BOTTOM - TOP) * Math.log(radius / low)) / Math.log(high / low);
  const line = points.map((p) => `${x(p.periodDays).toFixed(1)},${y(p.rMin).toFixed(1)}`).join(" ");
  const { hz_inner_period: inner, hz_outer_period: outer } = star.values;
  const from = inner === undefined ? null : Math.max(first, inner);
  const to = outer === undefined ? null : Math.min(last, outer);
  const hasZone = from !== null && to !== null && from < to;
  const end = points.at(-1)?.periodDays ?? last;
  const summary = `Smallest planet found: ${fixed(points[0]?.rMin ?? 0, 2)} Earth radii at ${fixed(first, 1)} d, ${fixed(points.at(-1)?.rMin ?? 0, 2)} at ${fixed(end, 0)} d; none beyond.`;
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className="w-full" role="img" aria-label={summary}>
      <defs>
        <pattern
          id="zone-hatch"
          width="5"
          height="5"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <line x1="0" y1="0" x2="0" y2="5" stroke="var(--zone)" strokeWidth="1" opacity="0.35" />
        </pattern>
      </defs>
      {hasZone ? (
        <g>
          <rect x={x(from)} y={TOP} width={x(to) - x(from)} height={BOTTOM - TOP} fill="var(--zone-soft)" />
          <rect x={x(from)} y={TOP} width={x(to) - x(from)} height={BOTTOM - TOP} fill="url(#zone-hatch)" />
        </g>
      ) : null}
      {RADII.filter((r) => r > low && r < high).map((r) => (
        <g key={r}>
          <line x1={LEFT} x2={RIGHT} y1={y(r)} y2={y(r)} stroke="var(--hair)" />
          <text
            x={LEFT - 4}
            y={y(r) + 3}
            fontSize={9}
            textAnchor="end"
            fill="var(--soft)"
            className="font-mono"
          >
            {r}
          </text>
        </g>
      ))}
      {hasZone ? (
        <text
          x={Math.max(LEFT + 30, Math.min(RIGHT - 30, (x(from) + x(to)) / 2))}
          y={TOP - 3}
          fontSize={9}
          textAnchor="middle"
          fill="var(--zone)"
        >
          habitable zone
        </text>
      ) : null}
      <polyline points={line} fill="none" stroke="var(--mark)" strokeWidth={1.7} />
      {PERIODS.filter((p) => p >= first && p <= last).map((p) => (
        <text
          key={p}
          x={x(p)}
          y={BOTTOM + 13}
          fontSize={9}
          textAnchor="middle"
          fill="var(--soft)"
          className="font-mono"
        >
          {p}
        </text>
      ))}
      <text x={RIGHT} y={BOTTOM + 24} fontSize={9} textAnchor="end" fill="var(--soft)">
        period, d
      </text>
      <text x={2} y={BOTTOM + 24} fontSize={9} fill="var(--soft)">
        radius, R⊕
      </text>
    </svg>
  );
};
