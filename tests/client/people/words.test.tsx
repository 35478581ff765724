import { describe, expect, test } from "vitest";
import type { Programme } from "#shared/api/programmes.ts";
import { can } from "#shared/policy/rights.ts";
import { piecesOf } from "#src/features/mailbox/body-text.tsx";
import { nextStep } from "#src/features/overview/next-step.ts";
import { homeOf, joinedProgramme, ownAddress } from "#src/features/sign-in/destination.ts";
import { asClock } from "#src/features/sign-in/use-wait.ts";
import { deedOf, differencesOf } from "#src/lib/logbook-words.ts";
import { sessionOf } from "./support.tsx";

const HERE = "http://127.0.0.1:4400";
const programme = (id: string, name = `Programme ${id}`) => ({
  id,
  name,
  roles: ["guest" as const],
  isInvented: true,
});

describe("where signing in leads", () => {
  test.each([
    ["/programmes/3/lists?sort=-merit#top", "/programmes/3/lists?sort=-merit#top"],
    ["//elsewhere.example/x", undefined],
    ["/\\elsewhere.example", undefined],
    ["https://elsewhere.example/", undefined],
    ["javascript:alert(1)", undefined],
    ["/sign-in?next=/me", undefined],
    ["", undefined],
    [null, undefined],
  ])("%s → %s", (next, expected) => {
    expect(ownAddress(next, HERE)).toBe(expected);
  });

  test("without a wish: into the only programme, else to the choice of them", () => {
    expect(homeOf({ programmes: [programme("7")] })).toBe("/programmes/7/overview");
    expect(homeOf({ programmes: [programme("7"), programme("8")] })).toBe("/programmes");
    expect(homeOf({ programmes: [] })).toBe("/programmes");
  });

  test("after an invitation: into the programme that is new, or the one of its name", () => {
    const before = sessionOf({ programmes: [programme("1")] });
    const after = sessionOf({ programmes: [programme("1"), programme("2")] });
    expect(joinedProgramme(before, after, "Programme 2")).toBe("/programmes/2/overview");
    expect(joinedProgramme(after, after, "Programme 1")).toBe("/programmes/1/overview");
  });
});

test("a wait is told as a clock", () => {
  expect([asClock(845), asClock(5)]).toEqual(["14:05", "0:05"]);
});

describe("lines of the logbook in words", () => {
  test.each([
    ["list.make", "list Winter", "made list Winter"],
    ["programme.choose-recipe", "programme Suns", "chose a recipe for programme Suns"],
    ["member.join", "member Ada", "joined the programme"],
    ["star.look-at", "star 5", "look at star 5"],
  ])("%s", (action, subject, words) => {
    expect(deedOf({ action, subject })).toBe(words);
  });

  test("show what differs, and leave out what does not", () => {
    const line = {
      before: { name: "A", roles: ["guest"], note: "same" },
      after: { name: "", roles: ["guest", "lead"], note: "same", stars: 3 },
    };
    expect(differencesOf(line)).toEqual([
      { name: "name", before: "A", after: "(blank)" },
      { name: "roles", before: "guest", after: "guest, lead" },
      { name: "stars", before: null, after: "3" },
    ]);
    expect(differencesOf({ before: null, after: null })).toEqual([]);
  });
});

test("only addresses of this installation can be followed from a mail", () => {
  const body = `Open\n${HERE}/invitations/abc?x=1\nnot http://127.0.0.1:4400.example/invitations/abc\n<b>`;
  expect(piecesOf(body, HERE).filter(({ to }) => to)).toEqual([
    { text: `${HERE}/invitations/abc?x=1`, to: "/invitations/abc?x=1" },
  ]);
  expect(
    piecesOf(body, HERE)
      .map(({ text }) => text)
      .join(""),
  ).toBe(body);
});

describe("the next step of a programme", () => {
  const counts = { extracts: 0, instruments: 0, selections: 0, merits: 0, lists: 0, members: 1 };
  const at = (more: Partial<Programme["counts"]>, edition: number | null = null) =>
    nextStep({ edition, counts: { ...counts, ...more } } as Programme);

  test("goes from the first file to the first list, and then there is none", () => {
    expect(at({})).toMatchObject({ action: "Read file", screen: "extracts" });
    expect(at({ extracts: 1 })).toMatchObject({ title: "Make the first catalogue edition" });
    expect(at({ extracts: 1 }, 1)).toMatchObject({ screen: "instruments" });
    expect(at({ extracts: 1, instruments: 1 }, 1)).toMatchObject({ screen: "catalogue" });
    expect(at({ extracts: 1, instruments: 1, lists: 1 }, 1)).toBeNull();
  });

  test("names a right that some role has", () => {
    const step = at({});
    expect(step && can({ roles: ["curator"] }, step.right)).toBe(true);
    expect(step && can({ roles: ["guest"] }, step.right)).toBe(false);
  });
});
