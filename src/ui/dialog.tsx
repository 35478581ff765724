import { type ReactNode, useEffect, useId, useRef } from "react";

interface Props {
  title: ReactNode;
  isOpen: boolean;
  onClose: () => void;
  /** Buttons at the foot, the main one last. */
  footer?: ReactNode;
  isWide?: boolean;
  children: ReactNode;
}

const FIRST_FIELD = ["input", "select", "textarea"].map((tag) => `${tag}:not(:disabled)`).join();

/** A modal dialog of the platform: Esc closes it and focus returns to where it came from. */
export const Dialog = ({ title, isOpen, onClose, footer, isWide = false, children }: Props) => {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const element = dialog.current;
    if (!element || !isOpen) return;
    const before = document.activeElement;
    element.showModal();
    // Else the cross in the corner has the focus, and a space that is typed closes what was opened.
    element.querySelector<HTMLElement>(FIRST_FIELD)?.focus();
    return () => {
      element.close();
      if (before instanceof HTMLElement) before.focus();
    };
  }, [isOpen]);
  if (!isOpen) return null;
  return (
    <dialog
      ref={dialog}
      aria-labelledby={titleId}
      onCancel={(event) => {
        // A file chooser that is left without a file sends the same event up from its field.
        if (event.target !== event.currentTarget) return;
        event.preventDefault();
        onClose();
      }}
      className={`m-auto max-h-[85dvh] w-full overflow-auto rounded border border-rule bg-sheet p-6 text-ink ${isWide ? "max-w-3xl" : "max-w-lg"}`}
    >
      <div className="mb-4 flex items-start justify-between gap-4">
        <h2 id={titleId} className="text-[22px]">
          {title}
        </h2>
        <button
          type="button"
          aria-label="Close"
          onClick={onClose}
          className="size-7 flex-none rounded text-lg text-soft hover:text-ink"
        >
          ×
        </button>
      </div>
      {children}
      {footer ? <div className="mt-6 flex flex-wrap justify-end gap-2">{footer}</div> : null}
    </dialog>
  );
};
