import { fixed } from "#shared/format/numbers.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { brightestUsable, noiseParts } from "#shared/science/noise.ts";
import { largestPart, usableAt } from "./noise-series.ts";

interface Props {
  card: CardSettings;
  magnitude: number;
  /** As it stands in the box, also while it is no number. */
  text: string;
  onText: (text: string) => void;
}

const Answer = ({ card, magnitude }: { card: CardSettings; magnitude: number }) => {
  const usable = usableAt(card, magnitude);
  if (usable === "never") return <>nothing is measured: sky and dark current alone fill its pixels.</>;
  if (usable === "saturated")
    return <>a star saturates; it measures from {fixed(brightestUsable(card), 1)} on.</>;
  if (usable === "too faint")
    return <>a star is too faint; it measures down to {fixed(card.faintLimit, 1)}.</>;
  const parts = noiseParts(card, magnitude);
  return (
    <>
      it reaches{" "}
      <em className="whitespace-nowrap text-mark">{fixed(parts.total, parts.total >= 100 ? 0 : 1)} ppm</em> in
      one hour; {largestPart(parts)} the largest part.
    </>
  );
};

/** The sentence that says how precise the card is, with the magnitude to be chosen in it. */
export const NoiseLede = ({ card, magnitude, text, onText }: Props) => (
  <p className="font-serif text-[26px] leading-snug">
    At magnitude{" "}
    <input
      aria-label="Magnitude"
      inputMode="decimal"
      value={text}
      onChange={(event) => onText(event.target.value)}
      onKeyDown={(event) => {
        if (event.key !== "ArrowUp" && event.key !== "ArrowDown") return;
        event.preventDefault();
        onText((magnitude + (event.key === "ArrowUp" ? 0.1 : -0.1)).toFixed(1));
      }}
      className="w-16 border-b-2 border-edge bg-transparent text-center text-ink"
    />{" "}
    <Answer card={card} magnitude={magnitude} />
  </p>
);
