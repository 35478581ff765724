import type { Programme } from "#shared/api/programmes.ts";
import { type Action, rolesThatCan } from "#shared/policy/rights.ts";
import { ROLE_LABELS } from "#shared/policy/roles.ts";
import type { Screen } from "#src/app/paths.ts";

export interface NextStep {
  title: string;
  text: string;
  /** Verb and object of the button. */
  action: string;
  screen: Screen;
  right: Action;
}

/** What brings the programme on, in the order of the work; nothing once there is a target list. */
export const nextStep = ({ edition, counts }: Programme): NextStep | null => {
  if (counts.extracts === 0)
    return {
      title: "Begin with a catalogue extract",
      text: "Bring a table of stars as a file. You confirm how its columns are read before anything is stored.",
      action: "Read file",
      screen: "extracts",
      right: "extract.edit",
    };
  if (edition === null)
    return {
      title: "Make the first catalogue edition",
      text: "An extract is here. Answer what its file cannot tell, and commit it: its stars become the catalogue.",
      action: "Go on with the extract",
      screen: "extracts",
      right: "extract.edit",
    };
  if (counts.instruments === 0)
    return {
      title: "Describe an instrument",
      text: "With its card and a campaign, each star gets its noise, its number of transits and the smallest planet within reach.",
      action: "Make instrument card",
      screen: "instruments",
      right: "instrument.edit",
    };
  if (counts.lists === 0)
    return {
      title: "Make the first target list",
      text: "Cut the catalogue to the stars you want, rank them, and keep the first of them as a list.",
      action: "Open the catalogue",
      screen: "catalogue",
      right: "list.make",
    };
  return null;
};

/** "Curator, Scientist or Lead", for who may not take the step. */
export const rolesInWords = (action: Action): string => {
  const labels = rolesThatCan(action).map((role) => ROLE_LABELS[role]);
  return labels.length < 2 ? labels.join("") : `${labels.slice(0, -1).join(", ")} or ${labels.at(-1)}`;
};
