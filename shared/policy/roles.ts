/** The roles a member of a programme can hold; one member may hold several. */
export const ROLES = [
  "curator",
  "scientist",
  "reviewer",
  "lead",
  "instrument-team",
  "guest",
  "administrator",
] as const;

export type Role = (typeof ROLES)[number];

export const ROLE_LABELS: Record<Role, string> = {
  curator: "Curator",
  scientist: "Scientist",
  reviewer: "Reviewer",
  lead: "Lead",
  "instrument-team": "Instrument team",
  guest: "Guest",
  administrator: "Administrator",
};
