import type { ReactNode } from "react";

/** Small capitals above a part of a panel. */
export const SectionTitle = ({ children }: { children: ReactNode }) => (
  <h3 className="mt-5 mb-2 text-[11px] font-semibold tracking-[0.09em] text-soft uppercase">{children}</h3>
);
