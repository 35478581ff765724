import { count } from "#shared/format/numbers.ts";
import type { Bins } from "./bins.ts";
import { figureText } from "./extract-words.ts";

const WIDTH = 480;
const HEIGHT = 150;
const FOOT = 18;

const total = (counts: readonly number[]): number => counts.reduce((sum, n) => sum + n, 0);

/** The picture in words: from where to where, and where most of it lies. */
export const histogramWords = ({ low, high, counts }: Bins, unit: string): string => {
  const most = counts.indexOf(Math.max(...counts));
  const width = (high - low) / counts.length;
  const of = unit === "" ? "" : ` ${unit}`;
  const range = `${count(total(counts))} values from ${figureText(low)} to ${figureText(high)}${of}`;
  return counts.length > 1
    ? `${range}; the highest bar is between ${figureText(low + most * width)} and ${figureText(low + (most + 1) * width)}.`
    : `${range}.`;
};

interface Props {
  bins: Bins;
  unit: string;
}

/** How the values of a column are spread, with the ends and the highest bar written out. */
export const ValueHistogram = ({ bins, unit }: Props) => {
  const { counts } = bins;
  const most = Math.max(1, ...counts);
  const bar = WIDTH / counts.length;
  const words = histogramWords(bins, unit);
  const height = (n: number): number => (n === 0 ? 0 : Math.max(1.5, ((HEIGHT - FOOT) * n) / most));
  return (
    <figure className="max-w-xl">
      <svg viewBox={`0 -14 ${WIDTH} ${HEIGHT + 14}`} className="w-full" role="img" aria-label={words}>
        <g fill="var(--faint)">
          {counts.map((n, i) => (
            <rect
              // biome-ignore lint/suspicious/noArrayIndexKey: the bars of a histogram stay where they are
              key={i}
              x={i * bar + 0.5}
              y={HEIGHT - FOOT - height(n)}
              width={Math.max(0.5, bar - 1)}
              height={height(n)}
            />
          ))}
        </g>
        <line x1={0} x2={WIDTH} y1={HEIGHT - FOOT} y2={HEIGHT - FOOT} stroke="var(--edge)" />
        <g className="fill-soft font-mono text-[11px]">
          <text x={0} y={HEIGHT - 4}>
            {figureText(bins.low)}
          </text>
          <text x={WIDTH / 2} y={HEIGHT - 4} textAnchor="middle">
            {unit}
          </text>
          <text x={WIDTH} y={HEIGHT - 4} textAnchor="end">
            {figureText(bins.high)}
          </text>
          <text x={0} y={-4}>
            {count(most)} in the highest bar
          </text>
        </g>
      </svg>
      <figcaption className="text-xs text-soft">{words}</figcaption>
    </figure>
  );
};
