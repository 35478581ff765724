import { QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render } from "@testing-library/react";
import { type ReactElement, Suspense } from "react";
import { createMemoryRouter, RouterProvider } from "react-router-dom";
import { afterEach, vi } from "vitest";
import type { Session } from "#shared/api/session.ts";
import { createQueryClient } from "#src/app/query-client.ts";

export const sessionOf = (more: Partial<Session> = {}): Session => ({
  person: null,
  csrfToken: "token-1",
  programmes: [],
  installation: { isDemo: false, hasMailbox: false },
  ...more,
});

export const PERSON: NonNullable<Session["person"]> = {
  id: "1",
  name: "Ada Marlow",
  email: "ada@example.org",
  isInstallationAdministrator: false,
  theme: null,
};

export interface Sent {
  method: string;
  path: string;
  token: string | null;
  body: unknown;
}
type Answer = { status: number; body?: unknown };

/** Stands in for the network alone: answers each request by method and path, and keeps what was sent. */
export const answerWith = (answer: (sent: Sent) => Answer): Sent[] => {
  const all: Sent[] = [];
  vi.stubGlobal("fetch", async (path: string, init: RequestInit) => {
    const sent: Sent = {
      method: init.method ?? "GET",
      path,
      token: new Headers(init.headers).get("X-CSRF-Token"),
      body: typeof init.body === "string" ? JSON.parse(init.body) : undefined,
    };
    all.push(sent);
    const { status, body } = answer(sent);
    return new Response(body === undefined ? null : JSON.stringify(body), { status });
  });
  return all;
};

export const refusal = (code: string, message: string, more: object = {}) => ({
  error: { code, message, ...more },
});

/** A page at that address, as the application shows it. */
export const openAt = (address: string, page: ReactElement): void => {
  const router = createMemoryRouter([{ path: "*", element: <Suspense>{page}</Suspense> }], {
    initialEntries: [address],
  });
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
};

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});
