import type { StarSheet } from "#shared/api/stars.ts";
import { count, fixed } from "#shared/format/numbers.ts";
import { EARTH_RADII_PER_SOLAR } from "#shared/science/constants.ts";
import { transitLossPpm } from "#shared/science/light-curve.ts";
import { limbDarkening } from "#shared/science/limb-darkening.ts";
import { scaledAxis } from "#shared/science/orbit.ts";

const WIDTH = 352;
const HEIGHT = 74;
const TOP = 14;
const DEEP = 34;
const POINTS = 130;

/** Scatter for drawing, the same each time for the same star; xorshift (Marsaglia 2003, J. Stat. Softw. 8, 14). */
const scatter = (seed: string): (() => number) => {
  let state = [...seed].reduce((hash, c) => Math.imul(hash ^ c.charCodeAt(0), 0x9e3779b1), 0x2545f491) || 1;
  const uniform = (): number => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
};

/** A transit of a planet of one Earth radius where the insolation is Earth's, with the instrument's noise about it. */
export const TransitPicture = ({ star }: { star: StarSheet }) => {
  const { radius, teff, earth_distance, earth_period, transit_duration, noise_1h, earth_depth } = star.values;
  const darkening = teff === undefined ? null : limbDarkening(teff);
  if (
    radius === undefined ||
    earth_distance === undefined ||
    earth_period === undefined ||
    transit_duration === undefined ||
    earth_depth === undefined ||
    !darkening
  )
    return (
      <p className="text-xs text-soft">
        Not drawn: it needs the radius, the temperature and the orbit where the insolation is Earth's.
      </p>
    );
  const a = scaledAxis(earth_distance, radius);
  const k = 1 / (EARTH_RADII_PER_SOLAR * radius);
  const span = 2.2 * transit_duration;
  const loss = (hours: number): number => transitLossPpm(hours, 24 * earth_period, a, k, 0.3, darkening);
  const deepest = loss(0);
  const y = (ppm: number): number => TOP + (DEEP * ppm) / deepest;
  const times = Array.from({ length: POINTS }, (_, i) => -span / 2 + (span * i) / (POINTS - 1));
  const x = (hours: number): number => WIDTH * (hours / span + 0.5);
  // The noise of a bin of the drawing, were one transit all there is.
  const bin = noise_1h === undefined ? 0 : noise_1h / Math.sqrt(span / POINTS);
  const normal = scatter(star.id);
  const words = `1 R⊕ · ${count(earth_depth)} ppm · ${fixed(transit_duration, 1)} h`;
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="w-full"
        role="img"
        aria-label={`A transit of an Earth: ${words}`}
      >
        {bin === 0
          ? null
          : times.map((t) => {
              const at = y(loss(t) + bin * normal());
              return at > 0 && at < HEIGHT - 12 ? (
                <circle key={t} cx={x(t)} cy={at} r={1.1} fill="var(--faint)" opacity={0.8} />
              ) : null;
            })}
        <polyline
          points={times.map((t) => `${x(t).toFixed(1)},${y(loss(t)).toFixed(1)}`).join(" ")}
          fill="none"
          stroke="var(--mark)"
          strokeWidth={1.6}
        />
        <text
          x={WIDTH / 2}
          y={HEIGHT - 2}
          textAnchor="middle"
          fontSize={9.5}
          fill="var(--soft)"
          className="font-mono"
        >
          {words}
        </text>
      </svg>
      <figcaption className="text-xs text-soft">
        Drawn, not measured: one transit at impact parameter 0.3
        {bin === 0 ? "." : `, with the instrument's noise in bins of ${fixed((60 * span) / POINTS, 0)} min.`}
      </figcaption>
    </figure>
  );
};
