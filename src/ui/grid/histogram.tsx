interface Props {
  all: readonly number[];
  selected: readonly number[];
}

const HEIGHT = 20;
const BAR = 4;

/** The whole catalogue in grey with the selection lit; heights by the square root, so that small bars are seen. */
export const HeadHistogram = ({ all, selected }: Props) => {
  const most = Math.max(1, ...all);
  const height = (n: number): number => (n === 0 ? 0 : Math.max(1, HEIGHT * Math.sqrt(n / most)));
  return (
    <svg
      viewBox={`0 0 ${all.length * BAR} ${HEIGHT}`}
      preserveAspectRatio="none"
      className="h-5 w-full"
      aria-hidden="true"
    >
      {all.map((n, i) => {
        const lit = selected[i] ?? 0;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: the bins of a histogram stay where they are
          <g key={i}>
            <rect
              x={i * BAR}
              y={HEIGHT - height(n)}
              width={BAR - 1}
              height={height(n)}
              fill="var(--faint)"
              opacity={0.4}
            />
            <rect
              x={i * BAR}
              y={HEIGHT - height(lit)}
              width={BAR - 1}
              height={height(lit)}
              fill="var(--mark)"
              opacity={0.85}
            />
          </g>
        );
      })}
    </svg>
  );
};
