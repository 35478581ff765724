import { useSyncExternalStore } from "react";

let message = "";
const listeners = new Set<() => void>();
let timer: ReturnType<typeof setTimeout> | undefined;
/** Quick successions (typing in a cut, scrolling) say only the last. */
const SETTLE_MS = 300;

/** Says something to a screen reader, politely, when things have settled. */
export const announce = (text: string): void => {
  clearTimeout(timer);
  timer = setTimeout(() => {
    if (message === text) return;
    message = text;
    for (const listener of listeners) listener();
  }, SETTLE_MS);
};

const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** The one polite region of the page. */
export const LiveRegion = () => (
  <div role="status" aria-live="polite" className="sr-only">
    {useSyncExternalStore(subscribe, () => message)}
  </div>
);
