/** Every address of the application: the pattern for the router, the builder for links. */
export const paths = {
  signIn: {
    pattern: "/sign-in",
    /** `next`: where signing in leads; `why`: what the page says first. */
    to: (next?: string, why?: "signed-out" | "ended"): string => {
      const params = new URLSearchParams({ ...(next ? { next } : {}), ...(why ? { why } : {}) });
      return params.size === 0 ? "/sign-in" : `/sign-in?${params}`;
    },
  },
  forgottenPassword: { pattern: "/forgotten-password", to: () => "/forgotten-password" },
  invitation: { pattern: "/invitations/:token", to: (token: string) => `/invitations/${token}` },
  passwordReset: { pattern: "/password-resets/:token" },
  me: { pattern: "/me", to: () => "/me" },
  mailbox: { pattern: "/mailbox", to: () => "/mailbox" },
  programmes: { pattern: "/programmes", to: () => "/programmes" },
  programme: {
    pattern: "/programmes/:programmeId",
    to: (programmeId: string, screen: Screen = "overview", more = "") =>
      `/programmes/${programmeId}/${screen}${more}`,
  },
} as const;

export type Screen =
  | "overview"
  | "extracts"
  | "catalogue"
  | "instruments"
  | "merit"
  | "lists"
  | "plan"
  | "logbook"
  | "settings";
