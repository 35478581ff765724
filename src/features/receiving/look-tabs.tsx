import { type KeyboardEvent, type ReactNode, useId, useRef } from "react";
import { useSearchParams } from "react-router-dom";

export interface Look<K extends string> {
  key: K;
  label: ReactNode;
  show: () => ReactNode;
}

const STEPS: Readonly<Record<string, (at: number, last: number) => number>> = {
  ArrowRight: (at, last) => (at === last ? 0 : at + 1),
  ArrowLeft: (at, last) => (at === 0 ? last : at - 1),
  Home: () => 0,
  End: (_at, last) => last,
};

/** Which look the address names, and the way to another; the first one needs no name. */
export const useLook = (): readonly [
  string | null,
  (look: string, more?: Record<string, string>) => void,
] => {
  const [params, setParams] = useSearchParams();
  const look = (key: string, more: Record<string, string> = {}) =>
    setParams((before) => new URLSearchParams({ ...Object.fromEntries(before), look: key, ...more }), {
      replace: true,
    });
  return [params.get("look"), look];
};

/** Several looks at the same thing, one at a time; the address keeps which. */
export const LookTabs = <K extends string>({
  label,
  looks,
}: {
  label: string;
  looks: readonly Look<K>[];
}) => {
  const id = useId();
  const [wanted, look] = useLook();
  const list = useRef<HTMLDivElement>(null);
  const at = Math.max(
    0,
    looks.findIndex((l) => l.key === wanted),
  );
  const onKeyDown = (event: KeyboardEvent) => {
    // The address follows a moment later; keys in quick succession go on from the tab that has the focus.
    const from = looks.findIndex((l) => l.key === (event.target as HTMLElement).dataset.look);
    const next = looks[STEPS[event.key]?.(from, looks.length - 1) ?? -1];
    if (!next) return;
    event.preventDefault();
    look(next.key);
    list.current?.querySelector<HTMLElement>(`[data-look="${next.key}"]`)?.focus();
  };
  return (
    <>
      <div
        ref={list}
        role="tablist"
        aria-label={label}
        onKeyDown={onKeyDown}
        className="mb-3 flex flex-wrap gap-x-5 border-b border-rule"
      >
        {looks.map(({ key, label: name }, i) => (
          <button
            key={key}
            type="button"
            role="tab"
            id={`${id}-${key}`}
            data-look={key}
            aria-selected={i === at}
            aria-controls={`${id}-panel`}
            tabIndex={i === at ? 0 : -1}
            onClick={() => look(key)}
            className={`-mb-px min-h-8 border-b-2 ${i === at ? "border-mark font-medium" : "border-transparent text-soft hover:text-ink"}`}
          >
            {name}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${looks[at]?.key}`}>
        {looks[at]?.show()}
      </div>
    </>
  );
};
