import type { StarSheet } from "#shared/api/stars.ts";
import { count, fixed } from "#shared/format/numbers.ts";
import { drawTransit } from "./transit-model.ts";

const WIDTH = 352;
const HEIGHT = 72;
const EDGE = 4;

const noiseWords = (dotPpm: number | null, folded: number): string => {
  if (dotPpm === null)
    return "Drawn, not measured. Without an instrument that sees this star there is no noise to draw.";
  const transits = folded === 1 ? "one transit" : `${count(folded)} transits folded`;
  return `Drawn, not measured: dots scatter as the noise does, ${fixed(dotPpm, 0)} ppm each, ${transits}.`;
};

/** A transit of a planet of one Earth radius where the insolation is Earth's, with the instrument's noise about it. */
export const TransitPicture = ({ star }: { star: StarSheet }) => {
  const drawn = drawTransit(star.id, star.values);
  if (!drawn)
    return (
      <p className="text-xs text-soft">
        Not drawn: it needs the radius, the temperature (2300 to 7200 K) and the orbit where the insolation is
        Earth's.
      </p>
    );
  const { curve, dots, durationHours, depthPpm, dotPpm, folded } = drawn;
  const losses = dots.map(([, ppm]) => ppm);
  const top = Math.min(-0.15 * depthPpm, ...losses);
  const bottom = Math.max(1.15 * depthPpm, ...losses);
  const span = curve.at(-1)?.[0] ?? 1;
  const x = (hours: number): number => (WIDTH / 2) * (1 + hours / span);
  const y = (ppm: number): number => EDGE + ((HEIGHT - 2 * EDGE) * (ppm - top)) / (bottom - top);
  const words = `1 R⊕ · ${count(depthPpm)} ppm · ${fixed(durationHours, 1)} h`;
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="w-full"
        role="img"
        aria-label={`A transit of an Earth: ${words}`}
      >
        {dots.map(([hours, ppm]) => (
          <circle key={hours} cx={x(hours)} cy={y(ppm)} r={1.1} fill="var(--faint)" opacity={0.8} />
        ))}
        <polyline
          points={curve.map(([hours, ppm]) => `${x(hours).toFixed(1)},${y(ppm).toFixed(2)}`).join(" ")}
          fill="none"
          stroke="var(--mark)"
          strokeWidth={1.6}
        />
      </svg>
      <figcaption className="text-[11px] text-soft">
        <span className="block text-center font-mono">{words}</span>
        {noiseWords(dotPpm, folded)}
      </figcaption>
    </figure>
  );
};
