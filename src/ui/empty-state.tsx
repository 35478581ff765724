import type { ReactNode } from "react";

/** An empty place says why it is empty and what comes next. */
export const EmptyState = ({
  title,
  children,
  actions,
}: {
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
}) => (
  <div className="mx-auto max-w-lg px-6 py-12 text-center">
    <p className="font-serif text-2xl">{title}</p>
    {children ? <div className="mt-2 text-soft">{children}</div> : null}
    {actions ? <div className="mt-5 flex flex-wrap justify-center gap-2">{actions}</div> : null}
  </div>
);
