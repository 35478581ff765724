import type { QueryClient } from "@tanstack/react-query";
import {
  createBrowserRouter,
  type LoaderFunctionArgs,
  Navigate,
  type RouteObject,
  redirect,
} from "react-router-dom";
import { sessionOptions } from "#src/api/session.ts";
import { Loading } from "#src/ui/loading.tsx";
import { ErrorPage, NotFoundPage } from "./error-page.tsx";
import { paths } from "./paths.ts";
import { ProgrammeShell } from "./programme-shell.tsx";
import { Shell } from "./shell.tsx";

/** Screens inside the shell need a person; a visitor is brought back here after signing in. */
const requirePerson = async (client: QueryClient, { request }: LoaderFunctionArgs): Promise<null> => {
  const session = await client.ensureQueryData(sessionOptions);
  if (session.person) return null;
  const { pathname, search } = new URL(request.url);
  throw redirect(paths.signIn.to(pathname === "/" ? undefined : pathname + search));
};

const programmeScreens: RouteObject[] = [
  { index: true, element: <Navigate to="overview" replace /> },
  {
    path: "overview",
    lazy: async () => ({
      Component: (await import("#src/features/overview/overview-page.tsx")).OverviewPage,
    }),
  },
  {
    path: "extracts",
    lazy: async () => ({
      Component: (await import("#src/features/receiving/extracts-page.tsx")).ExtractsPage,
    }),
  },
  {
    path: "extracts/:extractId",
    lazy: async () => ({ Component: (await import("#src/features/receiving/extract-page.tsx")).ExtractPage }),
  },
  {
    path: "catalogue",
    lazy: async () => ({
      Component: (await import("#src/features/workbench/workbench-page.tsx")).WorkbenchPage,
    }),
  },
  {
    path: "instruments",
    lazy: async () => ({
      Component: (await import("#src/features/instruments/instruments-page.tsx")).InstrumentsPage,
    }),
  },
  {
    path: "merit",
    lazy: async () => ({ Component: (await import("#src/features/merit/merit-page.tsx")).MeritPage }),
  },
  {
    path: "lists",
    lazy: async () => ({ Component: (await import("#src/features/lists/lists-page.tsx")).ListsPage }),
  },
  {
    path: "lists/:listId",
    lazy: async () => ({ Component: (await import("#src/features/lists/list-page.tsx")).ListPage }),
  },
  {
    path: "plan",
    lazy: async () => ({ Component: (await import("#src/features/plan/plan-page.tsx")).PlanPage }),
  },
  {
    path: "logbook",
    lazy: async () => ({ Component: (await import("#src/features/logbook/logbook-page.tsx")).LogbookPage }),
  },
  {
    path: "settings",
    lazy: async () => ({
      Component: (await import("#src/features/settings/settings-page.tsx")).SettingsPage,
    }),
  },
  {
    path: "settings/recipes/:recipeId",
    lazy: async () => ({ Component: (await import("#src/features/settings/recipe-page.tsx")).RecipePage }),
  },
];

const personScreens: RouteObject[] = [
  { index: true, element: <Navigate to={paths.programmes.to()} replace /> },
  {
    path: paths.programmes.pattern,
    lazy: async () => ({
      Component: (await import("#src/features/programmes/programmes-page.tsx")).ProgrammesPage,
    }),
  },
  {
    path: paths.me.pattern,
    lazy: async () => ({ Component: (await import("#src/features/me/me-page.tsx")).MePage }),
  },
  {
    path: paths.mailbox.pattern,
    lazy: async () => ({ Component: (await import("#src/features/mailbox/mailbox-page.tsx")).MailboxPage }),
  },
  { path: paths.programme.pattern, Component: ProgrammeShell, children: programmeScreens },
  { path: "*", Component: NotFoundPage },
];

const visitorScreens: RouteObject[] = [
  {
    path: paths.signIn.pattern,
    lazy: async () => ({ Component: (await import("#src/features/sign-in/sign-in-page.tsx")).SignInPage }),
  },
  {
    path: paths.forgottenPassword.pattern,
    lazy: async () => ({
      Component: (await import("#src/features/sign-in/forgotten-password-page.tsx")).ForgottenPasswordPage,
    }),
  },
  {
    path: paths.invitation.pattern,
    lazy: async () => ({
      Component: (await import("#src/features/sign-in/invitation-page.tsx")).InvitationPage,
    }),
  },
  {
    path: paths.passwordReset.pattern,
    lazy: async () => ({
      Component: (await import("#src/features/sign-in/password-reset-page.tsx")).PasswordResetPage,
    }),
  },
];

export const createRouter = (client: QueryClient) =>
  createBrowserRouter([
    {
      ErrorBoundary: ErrorPage,
      HydrateFallback: Loading,
      // Every request that changes something needs the session's token, a visitor's too.
      loader: async () => {
        await client.ensureQueryData(sessionOptions);
        return null;
      },
      shouldRevalidate: () => false,
      children: [
        ...visitorScreens,
        {
          path: "/",
          Component: Shell,
          loader: (args) => requirePerson(client, args),
          // The view of a table lives in the search parameters; only another page asks for the person again.
          shouldRevalidate: ({ currentUrl, nextUrl }) => currentUrl.pathname !== nextUrl.pathname,
          children: personScreens,
        },
      ],
    },
  ]);
