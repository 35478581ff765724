import type { ReactNode } from "react";

interface Props {
  /** Heading of the page, and of its tab. */
  title: string;
  /** Small words above the heading. */
  over?: ReactNode;
  /** What stands under the heading. */
  lede?: ReactNode;
  actions?: ReactNode;
  children: ReactNode;
}

/** A page of words and forms: one heading, its main actions at the right, a readable width. */
export const Page = ({ title, over, lede, actions, children }: Props) => (
  <main className="mx-auto w-full max-w-5xl px-5 py-6 pb-16">
    <title>{`${title} · Shortlight`}</title>
    <header className="mb-6 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
      <div className="min-w-0">
        {over ? <p className="text-xs text-soft">{over}</p> : null}
        <h1 className="text-[32px] wrap-anywhere">{title}</h1>
        {lede ? <div className="mt-1 max-w-2xl text-soft">{lede}</div> : null}
      </div>
      {actions ? <div className="flex flex-wrap gap-2">{actions}</div> : null}
    </header>
    {children}
  </main>
);

/** A part of a page with its own heading, ruled off from the one before. */
export const Section = ({
  title,
  note,
  children,
}: {
  title: string;
  note?: ReactNode;
  children: ReactNode;
}) => (
  <section
    aria-label={title}
    className="grid gap-x-8 gap-y-3 border-t border-rule py-6 md:grid-cols-[14rem_minmax(0,1fr)]"
  >
    <div>
      <h2 className="text-[22px]">{title}</h2>
      {note ? <p className="mt-1 text-[13px] text-soft">{note}</p> : null}
    </div>
    <div className="min-w-0">{children}</div>
  </section>
);
