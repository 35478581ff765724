interface Props {
  label: string;
  done: number;
  /** Unknown while null: the bar then only says that work goes on. */
  total: number | null;
  unit: string;
}

const count = (value: number): string => Math.round(value).toLocaleString("en").replaceAll(",", "\u2009");

/** Progress in real units: "61 200 of 100 000 rows". */
export const Progress = ({ label, done, total, unit }: Props) => {
  const share = total ? Math.min(1, done / total) : undefined;
  return (
    <div>
      <div className="flex flex-wrap justify-between gap-x-4">
        <span>{label}</span>
        <span className="font-mono text-[13px] whitespace-nowrap text-soft">
          {total === null ? `${count(done)} ${unit}` : `${count(done)} of ${count(total)} ${unit}`}
        </span>
      </div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={total ?? undefined}
        aria-valuenow={total === null ? undefined : Math.min(done, total)}
        className="mt-1.5 h-[3px] bg-hair"
      >
        <div className="h-full bg-ink" style={{ width: share === undefined ? "15%" : `${100 * share}%` }} />
      </div>
    </div>
  );
};
