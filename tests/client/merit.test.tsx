import { QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { Suspense } from "react";
import { createMemoryRouter, RouterProvider } from "react-router-dom";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Merit } from "#shared/api/merits.ts";
import type { Role } from "#shared/policy/roles.ts";
import { createQueryClient } from "#src/app/query-client.ts";
import { MeritPage } from "#src/features/merit/merit-page.tsx";
import { meritDraftSchema, newTerm, readFigure, shapeDrawn } from "#src/features/merit/term-draft.ts";
import { answerWith, PERSON, refusal, type Sent, sessionOf } from "./people/support.tsx";

const merit: Merit = {
  id: "7",
  versionId: "8",
  number: 2,
  name: "Practice merit",
  note: "",
  terms: [
    {
      label: "reach",
      expression: "r_min",
      shape: { kind: "ramp", zeroAt: 1.5, oneAt: 0.5 },
      weight: 4,
      blanks: "zero",
      zeroZeroesAll: false,
    },
    {
      label: "trust",
      expression: "flags",
      shape: { kind: "loss", perUnit: 0.25 },
      weight: 1,
      blanks: "neutral",
      zeroZeroesAll: true,
    },
  ],
  savedBy: { id: "1", name: "Ada Marlow" },
  savedAt: "2031-03-04T09:15:00.000Z",
};

/** What the server holds, and how it answers a save. */
let held: Merit[] = [];
let saveAnswer: (sent: Sent) => { status: number; body: unknown };

const open = async (roles: Role[], search = ""): Promise<Sent[]> => {
  const programmes = [{ id: "3", name: "Small Suns", roles, isInvented: true }];
  const sent = answerWith((request) => {
    if (request.path === "/api/session")
      return { status: 200, body: { session: sessionOf({ person: PERSON, programmes }) } };
    return request.method === "GET" ? { status: 200, body: { merits: held } } : saveAnswer(request);
  });
  const router = createMemoryRouter(
    [
      {
        path: "/programmes/:programmeId/merit",
        element: (
          <Suspense>
            <MeritPage />
          </Suspense>
        ),
      },
    ],
    { initialEntries: [`/programmes/3/merit${search}`] },
  );
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  await screen.findByRole("heading", { level: 1 });
  return sent;
};

const weights = (): HTMLInputElement[] => screen.getAllByRole("spinbutton", { name: "Weight" });
const saves = (sent: readonly Sent[]): Sent[] => sent.filter(({ method }) => method !== "GET");

beforeEach(() => {
  held = [merit];
  saveAnswer = ({ body }) => {
    const saved = { ...merit, ...(body as object), number: 3, versionId: "9" };
    held = [saved];
    return { status: 200, body: { merit: saved } };
  };
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

describe("figures as they are typed", () => {
  test("take a true minus, and explain a decimal comma", () => {
    expect(readFigure(" \u22121.5 ")).toBe(-1.5);
    expect(readFigure("0,35")).toBe("0,35: use a point for decimals here (0.35).");
    expect(readFigure("many")).toContain("is not a figure");
  });

  test("that are missing are named where they stand, the name with them", () => {
    const parsed = meritDraftSchema.safeParse({ name: " ", note: "", terms: [newTerm()] });
    expect((parsed.error?.issues ?? []).map((issue) => issue.path.join("."))).toEqual([
      "name",
      "terms.0.label",
      "terms.0.expression",
      "terms.0.shape.zeroAt",
      "terms.0.shape.oneAt",
    ]);
  });

  test("make a shape only when they are whole and make sense", () => {
    const draft = { ...newTerm(), figures: { zeroAt: "1.5", oneAt: "0.5" } };
    expect(shapeDrawn(draft)).toEqual({ kind: "ramp", zeroAt: 1.5, oneAt: 0.5 });
    expect(shapeDrawn({ ...draft, figures: { zeroAt: "1", oneAt: "1" } })).toBeNull();
    expect(shapeDrawn({ ...draft, kind: "table", table: "0 0\n2 1" })).toEqual({
      kind: "table",
      points: [
        [0, 0],
        [2, 1],
      ],
    });
    expect(shapeDrawn({ ...draft, kind: "table", table: "0 0\ntwo 1" })).toBeNull();
  });
});

describe("the merit page", () => {
  test("saves what was changed as the next version, with the version it began from", async () => {
    const sent = await open(["scientist"]);
    const save = screen.getByRole("button", { name: "Save as version 3" });
    expect(save).toHaveProperty("disabled", true);
    fireEvent.keyDown(weights()[0] as Element, { key: "ArrowUp" });
    expect(weights()[0]?.value).toBe("4.5");
    fireEvent.click(save);
    await screen.findByRole("button", { name: "Save as version 4" });
    const [put] = saves(sent);
    expect(put?.path).toBe("/api/programmes/3/merits/7");
    const terms = merit.terms.map((term, i) => (i === 0 ? { ...term, weight: 4.5 } : term));
    expect(put?.body).toEqual({ name: "Practice merit", note: "", terms, number: 2 });
  });

  test("sends nothing while a figure is none, and says which", async () => {
    const sent = await open(["lead"]);
    fireEvent.change(weights()[1] as Element, { target: { value: "0,5" } });
    fireEvent.click(screen.getByRole("button", { name: "Save as version 3" }));
    await screen.findByRole("alert");
    expect(screen.getAllByText(/use a point for decimals here \(0.5\)/).length).toBeGreaterThan(0);
    expect(saves(sent)).toEqual([]);
  });

  test("keeps what was typed when another saved first, and offers both ways on", async () => {
    saveAnswer = () => ({
      status: 409,
      body: refusal("changed-meanwhile", "Version 3 of this figure of merit was saved after yours."),
    });
    await open(["scientist"]);
    fireEvent.change(weights()[0] as Element, { target: { value: "9" } });
    fireEvent.click(screen.getByRole("button", { name: "Save as version 3" }));
    await screen.findByRole("button", { name: "Open the newer version" });
    expect(weights()[0]?.value).toBe("9");
    expect(screen.getByRole("button", { name: "Save as version 3" })).toHaveProperty("disabled", true);
    expect(screen.getByRole("button", { name: "Save under another name" })).toBeTruthy();
  });

  test("moves and removes terms, and their parts of the weight follow", async () => {
    await open(["scientist"]);
    fireEvent.click(screen.getByRole("button", { name: "Move term 2 up" }));
    expect(screen.getAllByRole("heading", { level: 2 }).map((h) => h.textContent)).toEqual([
      "1. trust20 % of the weight",
      "2. reach80 % of the weight",
    ]);
    fireEvent.click(screen.getByRole("button", { name: "Remove term 1" }));
    await waitFor(() =>
      expect(screen.getByRole("heading", { level: 2 }).textContent).toBe("1. reach100 % of the weight"),
    );
    expect(screen.getByRole("button", { name: "Remove term 1" })).toHaveProperty("disabled", true);
  });

  test("says at once what is wrong with a formula", async () => {
    await open(["scientist"]);
    fireEvent.change(screen.getAllByLabelText("Looks at")[0] as Element, { target: { value: "r_mim" } });
    expect(await screen.findByText(/There is no column r_mim/)).toBeTruthy();
  });

  test("lets a reviewer read, and change nothing", async () => {
    await open(["reviewer"]);
    expect(screen.queryByRole("button", { name: /Save/ })).toBeNull();
    expect(weights().every((weight) => weight.disabled)).toBe(true);
    expect(screen.getByText(/Changing it needs the Scientist or the Lead role/)).toBeTruthy();
  });

  test("says what is missing where there is none yet", async () => {
    held = [];
    await open(["scientist"]);
    expect(screen.getByText("No figure of merit yet.")).toBeTruthy();
  });
});
