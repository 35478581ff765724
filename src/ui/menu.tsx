import { type KeyboardEvent, type ReactNode, useEffect, useRef, useState } from "react";

interface Props {
  /** What the trigger is called; it may show less. */
  label: string;
  trigger: ReactNode;
  triggerClassName?: string;
  align?: "left" | "right";
  children: ReactNode;
}

const items = (menu: HTMLElement | null): HTMLElement[] => [
  ...(menu?.querySelectorAll<HTMLElement>('[role^="menuitem"]') ?? []),
];

const step: Readonly<Record<string, (at: number, count: number) => number>> = {
  ArrowDown: (at, count) => (at + 1) % count,
  ArrowUp: (at, count) => (at - 1 + count) % count,
  Home: () => 0,
  End: (_, count) => count - 1,
};

/** A button that opens a menu: arrows move, Enter chooses, Esc closes and returns focus. */
export const Menu = ({ label, trigger, triggerClassName = "", align = "right", children }: Props) => {
  const [isOpen, setOpen] = useState(false);
  const place = useRef<HTMLDivElement>(null);
  const menu = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  useEffect(() => {
    if (!isOpen) return;
    items(menu.current)[0]?.focus();
    const onPointer = (event: PointerEvent) => {
      if (!place.current?.contains(event.target as Node)) setOpen(false);
    };
    window.addEventListener("pointerdown", onPointer);
    return () => window.removeEventListener("pointerdown", onPointer);
  }, [isOpen]);
  const close = () => {
    setOpen(false);
    button.current?.focus();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === "Escape") close();
    else if (event.key === "Tab") {
      setOpen(false);
      return;
    } else {
      const all = items(menu.current);
      const move = step[event.key];
      if (!move || all.length === 0) return;
      all[move(all.indexOf(document.activeElement as HTMLElement), all.length)]?.focus();
    }
    event.preventDefault();
    event.stopPropagation();
  };
  return (
    <div ref={place} className="relative">
      <button
        ref={button}
        type="button"
        aria-label={label}
        aria-haspopup="menu"
        aria-expanded={isOpen}
        onClick={() => setOpen(!isOpen)}
        className={triggerClassName}
      >
        {trigger}
      </button>
      {isOpen ? (
        <div
          ref={menu}
          role="menu"
          tabIndex={-1}
          aria-label={label}
          onKeyDown={onKeyDown}
          onClick={close}
          className={`absolute z-40 mt-1 max-h-[70dvh] min-w-56 overflow-auto rounded border border-rule bg-sheet py-1.5 ${align === "right" ? "right-0" : "left-0"}`}
        >
          {children}
        </div>
      ) : null}
    </div>
  );
};

interface ItemProps {
  onSelect: () => void;
  isChecked?: boolean;
  children: ReactNode;
}

/** What tells a choice among several from a plain command. */
const roleOf = (isChecked: boolean | undefined) =>
  isChecked === undefined ? { role: "menuitem" } : { role: "menuitemradio", "aria-checked": isChecked };

export const MenuItem = ({ onSelect, isChecked, children }: ItemProps) => (
  <button
    type="button"
    {...roleOf(isChecked)}
    tabIndex={-1}
    onClick={onSelect}
    className="flex min-h-8 w-full items-center gap-2 px-3 text-left hover:bg-sel focus-visible:bg-sel"
  >
    {isChecked === undefined ? null : <span className="w-3 font-mono">{isChecked ? "●" : ""}</span>}
    {children}
  </button>
);

export const MenuLabel = ({ children }: { children: ReactNode }) => (
  <div
    role="presentation"
    className="px-3 pt-1.5 pb-0.5 text-[11px] font-semibold tracking-wider text-soft uppercase"
  >
    {children}
  </div>
);

export const MenuLine = () => <hr className="my-1.5 border-hair" />;
