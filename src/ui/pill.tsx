import type { ReactNode } from "react";

const TONES = {
  calm: "bg-zone-soft text-zone",
  warning: "bg-mark-soft text-mark",
  plain: "bg-hair text-ink",
} as const;

/** A short word about a thing: a flag, a state. */
export const Pill = ({
  tone = "plain",
  title,
  children,
}: {
  tone?: keyof typeof TONES;
  title?: string;
  children: ReactNode;
}) => (
  <span
    title={title}
    className={`inline-block rounded-full border border-transparent px-2 py-px text-[11px] ${TONES[tone]}`}
  >
    {children}
  </span>
);
