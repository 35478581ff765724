import type { ButtonHTMLAttributes } from "react";

interface Props extends ButtonHTMLAttributes<HTMLButtonElement> {
  /** The one main action of a place; the rest are quiet. */
  kind?: "main" | "quiet" | "plain" | "danger";
  /** Work is under way: the button stays, says so, and cannot be pressed twice. */
  isBusy?: boolean;
}

const KINDS = {
  main: "border-ink bg-ink text-paper hover:opacity-90",
  quiet: "border-edge bg-sheet text-ink hover:bg-sel",
  plain: "border-transparent text-ink underline decoration-edge underline-offset-4 hover:decoration-ink",
  danger: "border-mark bg-sheet text-mark hover:bg-mark-soft",
} as const;

export const Button = ({
  kind = "quiet",
  isBusy = false,
  disabled,
  className = "",
  children,
  type = "button",
  ...rest
}: Props) => (
  <button
    type={type}
    disabled={disabled || isBusy}
    aria-busy={isBusy || undefined}
    className={`inline-flex min-h-8 items-center justify-center gap-1.5 rounded border px-3 py-1 text-[13px] whitespace-nowrap disabled:opacity-60 ${KINDS[kind]} ${className}`}
    {...rest}
  >
    {children}
    {isBusy ? "…" : null}
  </button>
);
