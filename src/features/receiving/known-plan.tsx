import type { ExtractPreview, ReadingPlan } from "#shared/api/extracts.ts";
import { Button } from "#src/ui/button.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";

interface Props {
  preview: ExtractPreview;
  onPlan: (plan: ReadingPlan) => void;
}

/** Offers the named plan under which a file with these columns was read before. */
export const KnownPlan = ({ preview, onPlan }: Props) => {
  const known = preview.knownPlan;
  if (!known) return null;
  return (
    <section aria-label="A plan made before" className="mb-4 rounded border border-edge bg-sheet p-3">
      <p className="wrap-anywhere">
        <LevelMark level="note" /> This header was read before with “{known.name}”, version {known.number}.
      </p>
      {known.differences.length > 0 ? (
        <>
          <p className="mt-1 text-soft">What differs here:</p>
          <ul className="list-disc pl-5 text-[13px]">
            {known.differences.map((difference) => (
              <li key={difference} className="wrap-anywhere">
                {difference}
              </li>
            ))}
          </ul>
        </>
      ) : (
        <p className="mt-1 text-soft">Nothing differs: with its answers nothing needs to be asked again.</p>
      )}
      <Button className="mt-2" onClick={() => onPlan(known.plan)}>
        Read with this plan
      </Button>
    </section>
  );
};
