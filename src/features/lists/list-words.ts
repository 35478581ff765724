import type { ListMember, TargetList } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";

export const STATE_LABELS: Readonly<Record<TargetList["state"], string>> = {
  draft: "Draft",
  "in-review": "In review",
  agreed: "Agreed",
  issued: "Issued",
  superseded: "Superseded",
  withdrawn: "Withdrawn",
};

export const MEMBER_LABELS: Readonly<Record<ListMember["state"], string>> = {
  in: "In",
  reserve: "Reserve",
  held: "Held",
  out: "Out",
};

/** Shape of a member's state, so that it is never told by colour alone. */
export const MEMBER_MARKS: Readonly<Record<ListMember["state"], string>> = {
  in: "●",
  reserve: "◐",
  held: "◆",
  out: "○",
};

/** "461 in, 12 reserve, 7 out": states that hold no star are left out. */
export const byStateWords = ({ byState }: Pick<TargetList, "byState">): string =>
  (Object.keys(MEMBER_LABELS) as ListMember["state"][])
    .filter((state) => byState[state] > 0)
    .map((state) => `${count(byState[state])} ${MEMBER_LABELS[state].toLowerCase()}`)
    .join(", ") || "no star";

export const isOpenToChange = ({ state }: Pick<TargetList, "state">): boolean =>
  state === "draft" || state === "in-review";
