import type { Finding } from "#shared/api/extracts.ts";
import { profileOf } from "../plan-profile.ts";
import { accept, ask, isAccepted, said } from "./finding.ts";
import type { Look } from "./look.ts";
import { slipOf } from "./slips.ts";

/** Other stars have other values: their middle may lie a factor of 1.6 from where the slip alone would put it. */
const OTHER_STARS = Math.log(1.6);

const HAS_FACTOR = /^(?:ra|dec|pmra|pmdec|parallax|distance|teff|light_share)(?:_err)?$/;

/** The header of a named plan with values of another size: the same name may not mean the same unit. */
export const shiftedFindings = (look: Look): Finding[] => {
  const { earlier } = look.knowledge;
  if (!earlier) return [];
  const now = profileOf(look.sample, look.plan);
  return look.used.flatMap(({ card }) => {
    const [before, after] = [earlier.profile[card.header], now[card.header]];
    const isComparable = HAS_FACTOR.test(card.means) && before !== undefined && after !== undefined;
    const slip = isComparable ? slipOf(after / before, OTHER_STARS) : undefined;
    if (!slip || isAccepted(look.plan, "values-shifted", card.header)) return [];
    return [
      ask(
        "values-shifted",
        `The header is that of “${earlier.name}”, but “${card.header}” is about ${slip.words}: half of its values lie below ${said(after ?? 0)} here, and below ${said(before ?? 0)} there.`,
        "Look at its unit. The plan stays as it is until you change it.",
        { column: card.header, answers: [accept("The unit is the same")] },
      ),
    ];
  });
};
