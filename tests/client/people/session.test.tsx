import { fireEvent, screen, waitFor } from "@testing-library/react";
import { describe, expect, test, vi } from "vitest";
import { keepSession, request, whenSignedOut } from "#src/api/client.ts";
import { SignInPage } from "#src/features/sign-in/sign-in-page.tsx";
import { answerWith, openAt, PERSON, refusal, sessionOf } from "./support.tsx";

const type = (label: string, value: string): void => {
  fireEvent.change(screen.getByLabelText(label), { target: { value } });
};

describe("a request with an old token", () => {
  const stale = { status: 403, body: refusal("stale-page", "This page belongs to an earlier session.") };

  test("is sent once more with the new one, for the same person", async () => {
    keepSession(sessionOf({ person: PERSON, csrfToken: "old" }));
    const sent = answerWith(({ path, token }) => {
      if (path === "/api/session")
        return { status: 200, body: { session: sessionOf({ person: PERSON, csrfToken: "new" }) } };
      return token === "new" ? { status: 200, body: { done: true } } : stale;
    });
    expect(await request("PATCH", "/me", { name: "A" })).toEqual({ done: true });
    expect(sent.filter(({ path }) => path === "/api/me").map(({ token }) => token)).toEqual(["old", "new"]);
  });

  test("is not sent in the name of another person who signed in meanwhile", async () => {
    keepSession(sessionOf({ person: PERSON, csrfToken: "old" }));
    const other = sessionOf({ person: { ...PERSON, id: "2" }, csrfToken: "new" });
    const sent = answerWith(({ path }) =>
      path === "/api/session" ? { status: 200, body: { session: other } } : stale,
    );
    await expect(request("PATCH", "/me", { name: "A" })).rejects.toMatchObject({ code: "stale-page" });
    expect(sent.filter(({ path }) => path === "/api/me")).toHaveLength(1);
  });
});

test("a session that has ended is told to the application", async () => {
  const leave = vi.fn();
  whenSignedOut(leave);
  keepSession(sessionOf({ person: PERSON }));
  answerWith(({ path }) =>
    path === "/api/session"
      ? { status: 200, body: { session: sessionOf() } }
      : { status: 401, body: refusal("signed-out", "You are not signed in.") },
  );
  await expect(request("GET", "/programmes")).rejects.toMatchObject({ status: 401 });
  expect(leave).toHaveBeenCalledTimes(1);
});

describe("the sign-in page", () => {
  test("says beside each field what is missing, sends nothing, and takes the focus", async () => {
    const sent = answerWith(() => ({ status: 200, body: { session: sessionOf() } }));
    openAt("/sign-in", <SignInPage />);
    fireEvent.click(await screen.findByRole("button", { name: "Sign in" }));
    const alert = await screen.findByRole("alert");
    await waitFor(() => expect(document.activeElement).toBe(alert));
    expect(screen.getByLabelText("Password").getAttribute("aria-invalid")).toBe("true");
    expect(sent.some(({ method }) => method === "POST")).toBe(false);
    fireEvent.click(screen.getByRole("button", { name: "Type your password." }));
    expect(document.activeElement).toBe(screen.getByLabelText("Password"));
  });

  test("waits as long as the server asks after too many attempts", async () => {
    answerWith(({ method }) =>
      method === "POST"
        ? {
            status: 429,
            body: refusal("too-many-attempts", "There were too many attempts.", {
              details: { waitSeconds: 600 },
            }),
          }
        : { status: 200, body: { session: sessionOf() } },
    );
    openAt("/sign-in", <SignInPage />);
    await screen.findByLabelText("Password");
    type("E-mail address", "ada@example.org");
    type("Password", "wrong");
    fireEvent.click(screen.getByRole("button", { name: "Sign in" }));
    const button = await screen.findByRole("button", { name: /^Wait (10:00|9:5\d)$/ });
    expect(button.hasAttribute("disabled")).toBe(true);
    expect(screen.getByLabelText<HTMLInputElement>("Password").value).toBe("");
  });

  test("names no password on a demo installation", async () => {
    answerWith(() => ({
      status: 200,
      body: { session: sessionOf({ installation: { isDemo: true, hasMailbox: true } }) },
    }));
    openAt("/sign-in?why=signed-out", <SignInPage />);
    expect((await screen.findByText(/demo installation/)).textContent).toContain("npm start");
    expect(screen.getByText("You are signed out.")).toBeTruthy();
  });
});
