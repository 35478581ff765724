import { configure, fireEvent, screen, waitFor } from "@testing-library/react";
import { Route, Routes } from "react-router-dom";
import { describe, expect, test } from "vitest";
import type { ExtractPreview, Finding, ReadingPlan } from "#shared/api/extracts.ts";
import { answered } from "#shared/catalogue/answers.ts";
import { keepSession } from "#src/api/client.ts";
import { ExtractPage } from "#src/features/receiving/extract-page.tsx";
import { givenAnswers, suggestedPlan } from "#src/features/receiving/plan-answers.ts";
import { answerWith, openAt, PERSON, refusal, sessionOf } from "../people/support.tsx";
import { extract, finding, preview as plainPreview } from "./fixtures.ts";

// A busy machine takes longer to show a page than the default second.
configure({ asyncUtilTimeout: 10_000 });

const EPOCH = finding("epoch-missing");
const MARK = finding("blank-mark", {
  column: "e_Ks",
  answers: [
    { value: "blank:-999", label: "A mark for no value" },
    { value: "number:-999", label: "A number" },
  ],
});
const preview: ExtractPreview = { ...plainPreview, findings: [EPOCH, MARK] };

/** What of the questions that plan leaves open, as the server would find. */
const stillOpen = (findings: readonly Finding[], plan: ReadingPlan): Finding[] =>
  findings.filter(({ code }) =>
    code === "epoch-missing"
      ? plan.epoch === null
      : plan.columns.every((card) => card.blankMarks.length + (card.keptNumbers ?? []).length === 0),
  );

describe("an answer in the plan", () => {
  test("an answer given can be taken back", () => {
    const plan = answered(suggestedPlan(preview), EPOCH, "2016");
    expect(plan.epoch).toBe(2016);
    const [given] = givenAnswers(plan);
    expect(given?.text).toBe("Positions are of 2016.0.");
    expect(given?.again.epoch).toBeNull();
  });
});

const ROLES = { curator: ["curator"], reviewer: ["reviewer"] } as const;

/** Stands for the server: keeps the plan and asks what the plan leaves open. */
const openExtract = (role: keyof typeof ROLES, isStale = false) => {
  const session = sessionOf({
    person: PERSON,
    programmes: [{ id: "9", name: "Small Suns", roles: [...ROLES[role]], isInvented: true }],
  });
  keepSession(session);
  let now = extract;
  const sent = answerWith(({ method, path, body }) => {
    if (path === "/api/session") return { status: 200, body: { session } };
    if (method === "PUT") {
      if (isStale) return { status: 409, body: refusal("stale-version", "Someone changed this extract.") };
      const { plan } = body as { plan: ReadingPlan };
      now = { ...now, plan, version: now.version + 1 };
      return { status: 200, body: { extract: now, preview, findings: stillOpen(preview.findings, plan) } };
    }
    if (method === "POST") return { status: 202, body: { extract: now, job: null } };
    return { status: 200, body: { extract: now, preview } };
  });
  openAt(
    "/programmes/9/extracts/5",
    <Routes>
      <Route path="/programmes/:programmeId/extracts/:extractId" element={<ExtractPage />} />
    </Routes>,
  );
  return sent;
};

const commitButton = (): HTMLButtonElement => screen.getByRole("button", { name: /^Commit extract/ });

describe("the reading plan on screen", () => {
  test("is committed only when every question is answered, with the version last kept", async () => {
    const sent = openExtract("curator");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(commitButton().disabled).toBe(true);
    fireEvent.click(screen.getByRole("button", { name: "A mark for no value" }));
    fireEvent.change(screen.getByLabelText("Epoch as a year"), { target: { value: "2016,0" } });
    fireEvent.click(screen.getByRole("button", { name: "Set epoch" }));
    await waitFor(() => expect(commitButton().disabled).toBe(false));
    fireEvent.click(commitButton());
    await waitFor(() => expect(sent.some(({ method }) => method === "POST")).toBe(true));
    const puts = sent.filter(({ method }) => method === "PUT");
    const last = puts.at(-1)?.body as { plan: ReadingPlan };
    expect(last.plan.epoch).toBe(2016);
    expect(last.plan.columns[1]?.blankMarks).toEqual(["-999"]);
    expect(sent.find(({ method }) => method === "POST")?.body).toEqual({ version: 1 + puts.length });
  });

  test("refuses a year that is none and sends nothing", async () => {
    const sent = openExtract("curator");
    await screen.findByLabelText("Epoch as a year");
    fireEvent.change(screen.getByLabelText("Epoch as a year"), { target: { value: "J2016" } });
    fireEvent.click(screen.getByRole("button", { name: "Set epoch" }));
    expect((await screen.findByRole("alert")).textContent).toContain("Enter a year from 1800 to 2200");
    expect(sent.every(({ method }) => method === "GET")).toBe(true);
  });

  test("keeps the answers on screen when someone else changed the extract, and offers theirs", async () => {
    openExtract("curator", true);
    fireEvent.click(await screen.findByRole("button", { name: "A mark for no value" }));
    await screen.findByRole("button", { name: "Show what is saved" });
    const marks = screen.getByLabelText<HTMLInputElement>(/^Blank marks of e_Ks/);
    expect(marks.value).toBe("-999");
  });

  test("is to be read only for who may not edit extracts", async () => {
    openExtract("reviewer");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(screen.queryByRole("button", { name: /Commit/ })).toBeNull();
    expect(screen.queryByRole("button", { name: "Delete extract" })).toBeNull();
    expect(screen.getByLabelText<HTMLSelectElement>("Meaning of RA").disabled).toBe(true);
  });
});
