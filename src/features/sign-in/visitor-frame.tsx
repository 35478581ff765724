import { type ReactNode, Suspense, useSyncExternalStore } from "react";
import { Mark } from "#src/app/mark.tsx";
import { currentTheme, nextTheme, showTheme, subscribeToTheme, THEME_LABELS } from "#src/app/theme.ts";
import { Loading } from "#src/ui/loading.tsx";

/** The page of someone who is not, or need not be, signed in: one sheet in the middle of the plate. */
export const VisitorFrame = ({ title, children }: { title: string; children: ReactNode }) => {
  const theme = useSyncExternalStore(subscribeToTheme, currentTheme);
  return (
    <div className="flex min-h-dvh flex-col">
      <title>{`${title} · Shortlight`}</title>
      <header className="flex min-h-[52px] items-center justify-between border-b border-rule px-5">
        <span className="flex items-center gap-2 font-serif text-[25px] leading-none">
          <Mark />
          Shortlight
        </span>
        <button
          type="button"
          onClick={() => showTheme(nextTheme())}
          className="min-h-8 text-[13px] text-soft underline decoration-edge underline-offset-4 hover:text-ink"
        >
          Theme: {THEME_LABELS[theme]}
        </button>
      </header>
      <main className="mx-auto w-full max-w-[26rem] grow px-4 py-10 sm:pt-[12dvh]">
        <div className="rounded border border-rule bg-sheet px-5 py-6 sm:px-7">
          <h1 className="mb-4 text-[28px]">{title}</h1>
          <Suspense fallback={<Loading />}>{children}</Suspense>
        </div>
      </main>
      <footer className="px-5 py-4 text-center text-[13px] text-soft">
        Shared, ranked and reviewable target lists for transit surveys
      </footer>
    </div>
  );
};
