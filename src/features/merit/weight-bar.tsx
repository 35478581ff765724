import { termColor } from "#src/lib/merit-strip.tsx";
import type { TermDraft } from "./term-draft.ts";

interface Props {
  terms: readonly TermDraft[];
  shares: readonly (number | null)[];
}

const nameOf = (term: TermDraft, index: number): string => term.label.trim() || `term ${index + 1}`;

/** How the weights are shared out: what a star that is perfect in every term would show. */
export const WeightBar = ({ terms, shares }: Props) => {
  const words = terms
    .map(
      (term, i) =>
        `${nameOf(term, i)} ${shares[i] == null ? "not weighed" : `${(100 * (shares[i] ?? 0)).toFixed(0)} %`}`,
    )
    .join(", ");
  return (
    <figure>
      <div role="img" aria-label={`Weights: ${words}`} className="flex h-3 w-full bg-hair">
        {terms.map((term, i) => (
          <div
            key={term.key}
            style={{
              width: `${100 * (shares[i] ?? 0)}%`,
              background: termColor(i),
              borderRight: "1px solid var(--paper)",
            }}
          />
        ))}
      </div>
      <figcaption className="mt-1.5 text-xs text-soft">
        merit = 100 × the sum of weight × what the shape gives, over the sum of the weights. A full bar is a
        merit of 100.
      </figcaption>
    </figure>
  );
};
