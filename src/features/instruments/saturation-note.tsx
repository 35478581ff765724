import { fixed } from "#shared/format/numbers.ts";
import type { CardSettings, DetectorCard } from "#shared/science/cards.ts";
import { brightestUsable, saturationMagnitude } from "#shared/science/noise.ts";
import { LevelMark } from "#src/ui/level-mark.tsx";

/** Stars this close to saturation deserve a word, mag. */
const NEAR = 1;
/** Image in sharp seeing, against the card's own. */
const SHARPER = 0.75;

const limitOf = ({ fullWell, mostCounts, gain = 1 }: DetectorCard): string =>
  mostCounts !== undefined && mostCounts * gain < fullWell
    ? "the converter reaches its largest number"
    : "the central pixel is full";

const Filling = ({ card }: { card: DetectorCard }) => {
  const [usual, sharp] = [card, { ...card, fwhmPx: SHARPER * card.fwhmPx }].map(saturationMagnitude);
  if (usual === undefined || sharp === undefined || Number.isNaN(usual)) return null;
  return (
    <>
      At magnitude {fixed(usual, 1)} and brighter, {limitOf(card)} within one exposure; with an image a
      quarter sharper, at {fixed(sharp, 1)} and brighter.{" "}
    </>
  );
};

/** A word of caution where a star comes near to what the card can bear. */
export const SaturationNote = ({ card, magnitude }: { card: CardSettings; magnitude: number }) => {
  const brightest = brightestUsable(card);
  if (!(magnitude < brightest + NEAR)) return null;
  return (
    <p role="note" className="mb-3 rounded border border-edge p-2.5 text-[13px] text-soft">
      <LevelMark level="ask" /> {magnitude < brightest ? "Saturated." : "Near saturation."}{" "}
      {card.model === "detector" ? <Filling card={card} /> : null}
      Neighbours in the same exposure may be brighter than the target. The observatory's own rules on bright
      stars go first.
    </p>
  );
};
