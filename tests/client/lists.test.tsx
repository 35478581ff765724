import { QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { type ReactElement, Suspense } from "react";
import { createMemoryRouter, RouterProvider } from "react-router-dom";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { ListMember, TargetList } from "#shared/api/lists.ts";
import type { Role } from "#shared/policy/roles.ts";
import { sessionOptions } from "#src/api/session.ts";
import { createQueryClient } from "#src/app/query-client.ts";
import { ListActions } from "#src/features/lists/list-actions.tsx";
import { ListsPage } from "#src/features/lists/lists-page.tsx";
import { MemberDialog } from "#src/features/lists/member-dialog.tsx";
import { Provenance } from "#src/features/lists/provenance.tsx";
import { StateLedger } from "#src/features/lists/state-ledger.tsx";
import { answerWith, PERSON, refusal, type Sent, sessionOf } from "./people/support.tsx";

const list: TargetList = {
  id: "5",
  name: "Winter first light",
  note: "",
  state: "draft",
  catalogueEdition: 2,
  viewParams: "edition=2&merit=8&cut=drop~Cool%20enough~teff%20%3C%203900&sort=-merit",
  merit: { versionId: "8", name: "Practice merit", number: 1, terms: ["reach"] },
  card: { versionId: "2", name: "Heron", number: 1 },
  campaign: null,
  recipe: { versionId: "1", name: "Default", number: 1, hash: "3f2a91c0".repeat(8) },
  stars: 150,
  byState: { in: 148, reserve: 0, held: 1, out: 1 },
  fingerprint: "7f3a-91c2",
  madeBy: { id: "1", name: "Ada Marlow" },
  madeAt: "2031-03-04T09:15:00.000Z",
  isInvented: true,
  version: 4,
};

const member: ListMember = {
  id: "77",
  place: 3,
  designation: "SL 116660",
  sourceId: null,
  release: null,
  values: {},
  blanks: {},
  flagBits: 0,
  merit: 80.3,
  shares: [80.3],
  state: "in",
  reason: "",
  cameIn: "place 3 of 7554 by merit",
};

let answer: (sent: Sent) => { status: number; body?: unknown };
beforeEach(() => {
  answer = () => ({ status: 204 });
  // The environment of these tests knows dialogs, not their being modal.
  HTMLDialogElement.prototype.showModal = function showModal() {
    this.open = true;
  };
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const show = (roles: Role[], part: ReactElement): Sent[] => {
  const sent = answerWith((request) => answer(request));
  const client = createQueryClient();
  const programmes = [{ id: "3", name: "Small Suns", roles, isInvented: true }];
  client.setQueryData(sessionOptions.queryKey, sessionOf({ person: PERSON, programmes }));
  const element = <Suspense>{part}</Suspense>;
  const router = createMemoryRouter([{ path: "/programmes/:programmeId/*", element }], {
    initialEntries: ["/programmes/3/lists"],
  });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return sent;
};

const actions = (): string[] =>
  [...screen.queryAllByRole("button"), ...screen.queryAllByRole("link")].map((e) => e.textContent ?? "");

describe("what can be done with a list", () => {
  const offered = (roles: Role[], state: TargetList["state"]): string[] => {
    show(roles, <ListActions programmeId="3" list={{ ...list, state }} />);
    const all = actions();
    cleanup();
    return all.sort();
  };

  test("follows the role and the state: no move that is not there", () => {
    const exports = ["Export CSV", "Export ECSV"];
    expect(offered(["lead"], "draft")).toEqual(["Delete draft", ...exports, "Rename list", "Send to review"]);
    expect(offered(["lead"], "in-review")).toEqual([...exports, "Rename list", "Take back to draft"]);
    expect(offered(["lead"], "agreed")).toEqual(exports);
    expect(offered(["reviewer"], "draft")).toEqual([...exports, "Rename list"]);
    expect(offered(["instrument-team"], "draft")).toEqual(exports);
    expect(offered(["guest"], "draft")).toEqual([]);
  });

  test("sends to review with the version that was seen", async () => {
    answer = ({ body }) => ({ status: 200, body: { list: { ...list, ...(body as object) } } });
    const sent = show(["scientist"], <ListActions programmeId="3" list={list} />);
    fireEvent.click(screen.getByRole("button", { name: "Send to review" }));
    await waitFor(() => expect(sent[0]?.body).toEqual({ state: "in-review", version: 4 }));
    expect(sent[0]?.path).toBe("/api/programmes/3/lists/5/state");
  });

  test("asks before a draft is deleted", async () => {
    const sent = show(["scientist"], <ListActions programmeId="3" list={list} />);
    fireEvent.click(screen.getByRole("button", { name: "Delete draft" }));
    expect(sent).toEqual([]);
    expect(screen.getByText(/150 stars and the reasons given for them go with it/)).toBeTruthy();
    fireEvent.click(screen.getAllByRole("button", { name: "Delete draft" }).at(-1) as Element);
    await waitFor(() => expect(sent[0]?.method).toBe("DELETE"));
  });

  test("exports from the address of the file", () => {
    show(["curator"], <ListActions programmeId="3" list={list} />);
    expect(screen.getByRole("link", { name: "Export ECSV" }).getAttribute("href")).toBe(
      "/api/programmes/3/lists/5/export?format=ecsv",
    );
  });
});

describe("a star of a list", () => {
  const openMember = (roles: Role[], state: TargetList["state"] = "in-review"): Sent[] =>
    show(
      roles,
      <MemberDialog
        programmeId="3"
        list={{ ...list, state }}
        member={member}
        mayEdit={roles.includes("reviewer")}
        onClose={() => undefined}
      />,
    );

  test("is not excluded without a reason of ten characters", async () => {
    const sent = openMember(["reviewer"]);
    fireEvent.click(screen.getByRole("radio", { name: /Out/ }));
    fireEvent.change(screen.getByLabelText("Reason"), { target: { value: "blend" } });
    fireEvent.click(screen.getByRole("button", { name: "Exclude star" }));
    expect((await screen.findAllByText(/at least 10 characters/)).length).toBeGreaterThan(0);
    expect(sent).toEqual([]);
    fireEvent.change(screen.getByLabelText("Reason"), { target: { value: "companion at 2.1 arcsec" } });
    fireEvent.click(screen.getByRole("button", { name: "Exclude star" }));
    await waitFor(() =>
      expect(sent[0]?.body).toEqual({ state: "out", reason: "companion at 2.1 arcsec", version: 4 }),
    );
  });

  test("that another changed first is not set over their word, unless the person says so", async () => {
    const words = "Someone changed this list after you opened it.";
    answer = ({ method }) =>
      method === "GET"
        ? { status: 200, body: { list: { ...list, state: "in-review", version: 9 } } }
        : { status: 409, body: refusal("changed-meanwhile", words) };
    const sent = openMember(["reviewer"]);
    fireEvent.click(screen.getByRole("radio", { name: /Held/ }));
    fireEvent.click(screen.getByRole("button", { name: "Save state" }));
    fireEvent.click(await screen.findByRole("button", { name: "Make my change all the same" }));
    await waitFor(() => expect(screen.queryByText(words)).toBeNull());
    fireEvent.click(screen.getByRole("button", { name: "Save state" }));
    await waitFor(() => expect(sent.at(-1)?.body).toEqual({ state: "held", reason: "", version: 9 }));
  });

  test("is only shown where the list is closed or the role cannot change it", () => {
    openMember(["reviewer"], "agreed");
    expect(screen.queryByRole("radio")).toBeNull();
    expect(screen.getByText(/The list is closed/)).toBeTruthy();
    cleanup();
    openMember(["curator"]);
    expect(screen.queryByRole("radio")).toBeNull();
    expect(screen.getByText(/needs the Scientist, Reviewer or Lead role/)).toBeTruthy();
  });
});

describe("a list on screen", () => {
  test("says where it stands and how many stars have which state", () => {
    show(["guest"], <StateLedger list={{ ...list, state: "in-review" }} />);
    const now = screen.getAllByRole("listitem").find((item) => item.getAttribute("aria-current") === "step");
    expect(now?.textContent).toBe("In review148 in, 1 held, 1 out");
  });

  test("names all that it was made from, and leads back to the view", () => {
    show(["guest"], <Provenance programmeId="3" list={list} />);
    expect(screen.getByText("1. Cool enough")).toBeTruthy();
    expect(screen.getByText("teff < 3900")).toBeTruthy();
    expect(screen.getByText("7f3a-91c2")).toBeTruthy();
    expect(screen.getByText("merit, highest first")).toBeTruthy();
    expect(screen.getByRole("link", { name: "Open this view in the catalogue" }).getAttribute("href")).toBe(
      `/programmes/3/catalogue?${list.viewParams}`,
    );
  });

  test("is one of the programme's lists, or says how to make the first", async () => {
    answer = () => ({ status: 200, body: { lists: [list] } });
    show(["scientist"], <ListsPage />);
    const link = await screen.findByRole("link", { name: "Winter first light" });
    expect(link.getAttribute("href")).toBe("/programmes/3/lists/5");
    cleanup();
    answer = () => ({ status: 200, body: { lists: [] } });
    show(["reviewer"], <ListsPage />);
    expect(await screen.findByText("No target list yet.")).toBeTruthy();
    expect(screen.getByText("Making one needs the Scientist or the Lead role.")).toBeTruthy();
  });
});
