const COLORS = ["var(--ink)", "var(--blue)", "var(--zone)", "var(--gold)", "var(--mark)", "var(--faint)"];
/** Width of a merit of 100, px. */
const FULL = 72;

/** Colour of a term, the same in every strip. */
export const termColor = (index: number): string => COLORS[index % COLORS.length] ?? "var(--ink)";

/** What adds up to the merit: each term's share as a piece of a bar, and in words. */
export const MeritStrip = ({ shares, terms }: { shares: readonly number[]; terms: readonly string[] }) => {
  const words = terms.map((term, i) => `${term} ${(shares[i] ?? 0).toFixed(1)}`).join(", ");
  return (
    <span role="img" aria-label={words} title={words} className="flex h-[9px]" style={{ width: FULL }}>
      {terms.map((term, i) => (
        <span
          key={term}
          style={{
            width: (FULL * (shares[i] ?? 0)) / 100,
            background: termColor(i),
            borderRight: "1px solid var(--paper)",
          }}
        />
      ))}
    </span>
  );
};
