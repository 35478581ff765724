import type { Shape } from "#shared/api/merits.ts";
import { shapeValue } from "#shared/merit/score.ts";

const WIDTH = 240;
const HEIGHT = 84;
const LEFT = 18;
const RIGHT = 8;
const TOP = 8;
const BOTTOM = 18;
const STEPS = 240;
/** Room beside the shape's own figures, as a share of their span. */
const MARGIN = 0.25;

/** Values at which the shape turns. */
const turns = (shape: Shape): number[] => {
  switch (shape.kind) {
    case "ramp":
      return [shape.zeroAt, shape.oneAt];
    case "step":
      return [shape.at];
    case "hump":
      return [shape.low, shape.peak, shape.high];
    case "table":
      return shape.points.map(([value]) => value);
    case "loss":
      return [0, 1 / shape.perUnit];
  }
};

/** The range of values to draw. */
export const drawnRange = (shape: Shape): readonly [number, number] => {
  const at = turns(shape);
  const [low, high] = [Math.min(...at), Math.max(...at)];
  const span = high > low ? high - low : Math.abs(low) || 1;
  const from = low - MARGIN * span;
  // A loss is drawn from nothing on: less than nothing is not lost.
  return [shape.kind === "loss" ? 0 : from, high + MARGIN * span];
};

/** A figure as it was typed, cut at five digits. */
const figure = (value: number): string => String(Number(value.toPrecision(5))).replace("-", "\u2212");

/** The shape in words, for those who do not see it. */
export const shapeWords = (shape: Shape): string => {
  switch (shape.kind) {
    case "ramp":
      return `0 at ${figure(shape.zeroAt)}, 1 at ${figure(shape.oneAt)}, straight between them and flat outside.`;
    case "step":
      return `1 ${shape.above ? "from" : "up to"} ${figure(shape.at)}${shape.above ? " on" : ""}, else 0.`;
    case "hump":
      return `0 at ${figure(shape.low)}, 1 at ${figure(shape.peak)}, 0 again at ${figure(shape.high)}.`;
    case "table":
      return shape.points.map(([value, gives]) => `${figure(value)} gives ${figure(gives)}`).join(", ");
    case "loss":
      return `1 at 0; each unit takes ${figure(shape.perUnit)} away, down to 0.`;
  }
};

/** What a shape makes of a value, drawn. */
export const ShapePicture = ({ shape, unit }: { shape: Shape | null; unit: string }) => {
  if (!shape)
    return (
      <p className="grid min-h-24 place-items-center self-start rounded border border-hair px-4 text-center text-xs text-soft">
        The picture comes when the shape's figures are there.
      </p>
    );
  const [low, high] = drawnRange(shape);
  const x = (value: number): number => LEFT + ((value - low) / (high - low)) * (WIDTH - LEFT - RIGHT);
  const y = (gives: number): number => HEIGHT - BOTTOM - gives * (HEIGHT - TOP - BOTTOM);
  const line = Array.from({ length: STEPS + 1 }, (_, i) => {
    const value = low + ((high - low) * i) / STEPS;
    return `${x(value).toFixed(1)},${y(shapeValue(shape, value)).toFixed(1)}`;
  });
  const marks = [...new Set(turns(shape))].sort((a, b) => a - b);
  // Only the ends of a long table: more would run into one another.
  const ticks = marks.length <= 3 ? marks : [marks[0] ?? 0, marks.at(-1) ?? 0];
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      className="w-full max-w-72"
      role="img"
      aria-label={shapeWords(shape)}
    >
      {[0, 1].map((gives) => (
        <g key={gives}>
          <line x1={LEFT} x2={WIDTH - RIGHT} y1={y(gives)} y2={y(gives)} stroke="var(--rule)" />
          <text x={LEFT - 5} y={y(gives) + 3} textAnchor="end" className="fill-soft font-mono text-[9px]">
            {gives}
          </text>
        </g>
      ))}
      <path
        d={`M${line.join("L")}L${x(high)},${y(0)}L${x(low)},${y(0)}Z`}
        fill="var(--blue-soft)"
        fillOpacity={0.6}
      />
      <polyline points={line.join(" ")} fill="none" stroke="var(--blue)" strokeWidth={1.6} />
      {ticks.map((value) => (
        <text
          key={value}
          x={Math.max(LEFT + 8, Math.min(WIDTH - RIGHT - 8, x(value)))}
          y={HEIGHT - 6}
          textAnchor="middle"
          className="fill-soft font-mono text-[9px]"
        >
          {figure(value)}
          {unit === "" || value !== ticks.at(-1) ? "" : ` ${unit}`}
        </text>
      ))}
    </svg>
  );
};
