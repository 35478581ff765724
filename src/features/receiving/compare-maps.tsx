import { useState } from "react";
import type { ExtractPreview } from "#shared/api/extracts.ts";
import { Button } from "#src/ui/button.tsx";
import { type Point, PositionMap } from "./position-map.tsx";

const HOURS_PER_TURN = 24;
const DEGREES_PER_HOUR = 15;

/** The sampled positions as they would be in either unit, whichever they were read in. */
const bothWays = (sky: ExtractPreview["sky"]): { hours: Point[]; degrees: Point[] } => {
  const isInHours = sky.some(([ra]) => ra >= HOURS_PER_TURN);
  const times = (factor: number): Point[] => sky.map(([ra, dec]) => [ra * factor, dec]);
  return isInHours
    ? { hours: times(1), degrees: times(1 / DEGREES_PER_HOUR) }
    : { hours: times(DEGREES_PER_HOUR), degrees: times(1) };
};

/** The evidence for one unit of right ascension or the other, side by side on request. */
export const CompareMaps = ({ sky }: Pick<ExtractPreview, "sky">) => {
  const [isOpen, setOpen] = useState(false);
  if (sky.length === 0) return null;
  const { hours, degrees } = bothWays(sky);
  return (
    <div className="mt-2">
      <Button aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
        {isOpen ? "Hide the maps" : "Compare on a map"}
      </Button>
      {isOpen ? (
        <div className="mt-3 grid gap-4 max-xl:sm:grid-cols-2">
          <PositionMap title="Read as hours" points={hours} isSmall />
          <PositionMap title="Read as degrees" points={degrees} isSmall />
        </div>
      ) : null}
    </div>
  );
};
