import { Suspense, useEffect, useState } from "react";
import { Link, Outlet, useParams } from "react-router-dom";
import { useSession } from "#src/api/session.ts";
import { announce } from "#src/ui/live-region.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { FindBox } from "./find-box.tsx";
import { HelpDialog } from "./help-dialog.tsx";
import { Mark } from "./mark.tsx";
import { Navigation } from "./navigation.tsx";
import { paths } from "./paths.ts";
import { PersonMenu } from "./person-menu.tsx";
import { nextTheme, showTheme, THEME_LABELS } from "./theme.ts";

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || ["INPUT", "TEXTAREA", "SELECT"].includes(target.tagName));

/** Keys that work on every screen: Shift+N for the next theme, ? for help, / for the find box. */
const useGlobalKeys = (showHelp: () => void): void => {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (isTyping(event.target) || event.ctrlKey || event.metaKey || event.altKey) return;
      if (event.key === "N" && event.shiftKey) {
        const theme = nextTheme();
        showTheme(theme);
        announce(`Theme: ${THEME_LABELS[theme]}`);
      } else if (event.key === "?") showHelp();
      else if (event.key === "/") document.getElementById("find-box")?.focus();
      else return;
      event.preventDefault();
    };
    window.addEventListener("keydown", onKey);
    return () => window.removeEventListener("keydown", onKey);
  }, [showHelp]);
};

const openHelp = (setOpen: (open: boolean) => void) => () => setOpen(true);

/** The frame of every screen: mark, navigation, find box, programme, person. */
export const Shell = () => {
  const { programmeId } = useParams();
  const { programmes } = useSession();
  const [isHelpOpen, setHelpOpen] = useState(false);
  const [showHelp] = useState(() => openHelp(setHelpOpen));
  useGlobalKeys(showHelp);
  const programme = programmes.find((p) => p.id === programmeId);
  return (
    <div className="flex h-dvh min-h-0 flex-col">
      <a
        href="#content"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-sheet focus:p-2"
      >
        Skip to the content
      </a>
      <header className="flex min-h-[52px] flex-none flex-wrap items-center gap-x-6 gap-y-1 border-b border-rule px-5 py-1">
        <Link
          to={paths.programmes.to()}
          className="flex items-center gap-2 font-serif text-[25px] leading-none"
        >
          <Mark />
          Shortlight
        </Link>
        {programme ? <Navigation programme={programme} /> : <div className="grow" />}
        {programme ? (
          <div className="max-xl:order-2">
            <FindBox programmeId={programme.id} />
          </div>
        ) : null}
        {programme?.isInvented ? (
          <span
            className="rounded-full border border-rule px-2 py-0.5 text-xs whitespace-nowrap text-soft max-xl:order-2"
            title="None of the stars of this programme exist"
          >
            invented sky
          </span>
        ) : null}
        <div className="max-xl:order-1 max-xl:ml-auto">
          <PersonMenu programme={programme} onHelp={showHelp} />
        </div>
      </header>
      <div id="content" tabIndex={-1} className="min-h-0 grow overflow-auto outline-none">
        <Suspense fallback={<Loading />}>
          <Outlet />
        </Suspense>
      </div>
      <HelpDialog isOpen={isHelpOpen} onClose={() => setHelpOpen(false)} />
    </div>
  );
};
