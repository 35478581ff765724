import type { ReactNode } from "react";

interface Props {
  caption: string;
  heads: readonly {
    key?: string;
    label: ReactNode;
    isNumber?: boolean;
    /** Left out on narrow windows; its cells carry `max-sm:hidden`. */
    isWideOnly?: boolean;
  }[];
  children: ReactNode;
}

/** A plain table ruled in hairlines; long tables of stars use the grid instead. */
export const LedgerTable = ({ caption, heads, children }: Props) => (
  <div className="relative overflow-x-auto">
    <table className="w-full border-collapse text-left">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr className="border-b border-rule">
          {heads.map(({ key, label, isNumber, isWideOnly }) => (
            <th
              key={key ?? String(label)}
              scope="col"
              className={`px-2 py-2 text-xs font-semibold ${isNumber ? "text-right" : ""} ${isWideOnly ? "max-sm:hidden" : ""}`}
            >
              {label}
            </th>
          ))}
        </tr>
      </thead>
      <tbody className="[&_td]:border-b [&_td]:border-hair [&_td]:px-2 [&_td]:py-2 [&_td]:align-top">
        {children}
      </tbody>
    </table>
  </div>
);
