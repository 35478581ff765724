import { Link } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import { paths } from "#src/app/paths.ts";
import { useCan } from "#src/lib/rights.ts";
import { nextStep, rolesInWords } from "./next-step.ts";

/** The next step of a programme that is still being set up, or whom it waits for. */
export const NextStepNote = ({ programme }: { programme: Programme }) => {
  const can = useCan();
  const step = nextStep(programme);
  if (!step) return null;
  return (
    <section aria-label="Next step" className="mt-6 max-w-2xl rounded border border-rule bg-sheet p-5">
      <p className="text-[11px] font-semibold tracking-[0.09em] text-soft uppercase">Next step</p>
      <h2 className="mt-1 text-[22px]">{step.title}</h2>
      <p className="mt-1 text-soft">{step.text}</p>
      {can(step.right) ? (
        <Link
          to={paths.programme.to(programme.id, step.screen)}
          className="mt-4 inline-flex min-h-8 items-center rounded border border-ink bg-ink px-3 py-1 text-[13px] text-paper hover:opacity-90"
        >
          {step.action}
        </Link>
      ) : (
        <p className="mt-3 text-[13px]">Someone with the role {rolesInWords(step.right)} does this.</p>
      )}
    </section>
  );
};
