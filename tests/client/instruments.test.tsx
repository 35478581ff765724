import { QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { Suspense } from "react";
import { createMemoryRouter, RouterProvider } from "react-router-dom";
import { afterEach, describe, expect, test } from "vitest";
import type { Card } from "#shared/api/instruments.ts";
import type { CardSettings } from "#shared/science/cards.ts";
import { brightestUsable, noiseParts } from "#shared/science/noise.ts";
import { sessionOptions } from "#src/api/session.ts";
import { createQueryClient } from "#src/app/query-client.ts";
import { campaignSchema, draftOfCampaign } from "#src/features/instruments/campaign-draft.ts";
import {
  draftOf,
  draftSchema,
  emptyDraft,
  readFigure,
  usableSettings,
  withModel,
} from "#src/features/instruments/card-draft.ts";
import { CardEditor } from "#src/features/instruments/card-editor.tsx";
import { NoiseLede } from "#src/features/instruments/noise-lede.tsx";
import { NoiseNumbers } from "#src/features/instruments/noise-numbers.tsx";
import { NoisePlot } from "#src/features/instruments/noise-plot.tsx";
import {
  axesOf,
  curve,
  largestPart,
  noiseTicks,
  PARTS,
  spread,
  usableAt,
} from "#src/features/instruments/noise-series.ts";
import { PrecisionTable } from "#src/features/instruments/precision-table.tsx";
import { SaturationNote } from "#src/features/instruments/saturation-note.tsx";
import { answerWith, PERSON, sessionOf } from "./people/support.tsx";

afterEach(cleanup);

const formula: CardSettings = {
  model: "formula",
  passband: "card_mag",
  referenceMagnitude: 10,
  photonPpm: 90,
  backgroundPpm: 12,
  floorPpm: 25,
  brightLimit: 7,
  faintLimit: 14.5,
};

const detector = usableSettings({ ...emptyDraft(), name: "Heron" });
if (detector?.model !== "detector") throw new Error("The first figures of a new card cannot be used.");

/** A detector that says everything a card can say. */
const everything: Required<Extract<Card["settings"], { model: "detector" }>> = {
  ...detector,
  photonBand: "R",
  passband: "rp_mag",
  magnitudeSystem: "ab",
  gain: 1.5,
  digitisation: 0.289,
  mostCounts: 65_535,
  scintillationLaw: "osborn",
  scintillationCoefficient: 1.35,
  comparisonStars: 4,
  jitterPpm: 120,
  redNoisePpm: 80,
};
const cardOf = (settings: Card["settings"]): Card => ({
  id: "1",
  versionId: "2",
  number: 3,
  name: "Heron",
  source: "a report",
  isVerified: true,
  settings,
  savedBy: { id: "1", name: "Someone" },
  savedAt: "2027-01-01T00:00:00.000Z",
});

const messagesOf = (draft: ReturnType<typeof emptyDraft>): Record<string, string> => {
  const parsed = draftSchema.safeParse(draft);
  return Object.fromEntries(
    (parsed.error?.issues ?? []).map((issue) => [issue.path.join("."), issue.message]),
  );
};

describe("a card as it is typed", () => {
  test("reads figures with spaces between thousands and a true minus", () => {
    expect(readFigure("98 000")).toBe(98_000);
    expect(readFigure("98\u2009000")).toBe(98_000);
    expect(readFigure("\u22121.5")).toBe(-1.5);
    expect(readFigure("")).toBeNaN();
    expect(readFigure("1,5")).toBeNaN();
  });

  test("gives back the card it was made from", () => {
    const card: Card = {
      id: "1",
      versionId: "2",
      number: 3,
      name: "Practice",
      source: "a report",
      isVerified: true,
      settings: formula as Card["settings"],
      savedBy: { id: "1", name: "Someone" },
      savedAt: "2027-01-01T00:00:00.000Z",
    };
    expect(draftSchema.parse(draftOf(card))).toEqual({
      name: "Practice",
      source: "a report",
      settings: formula,
    });
  });

  test("keeps all that a detector can say, and says nothing that it did not", () => {
    expect(draftSchema.parse(draftOf(cardOf(everything))).settings).toEqual(everything);
    expect(draftSchema.parse(draftOf(cardOf(detector as Card["settings"]))).settings).toEqual(detector);
    const stated = { ...detector, magnitudeSystem: "vega", scintillationLaw: "young" } as Card["settings"];
    expect(draftSchema.parse(draftOf(cardOf(stated))).settings).toEqual(stated);
    expect(Object.keys(detector).filter((key) => /gain|counts|digit|law|ppm/i.test(key))).toEqual([
      "floorPpm",
    ]);
  });

  test("what is cleared is no longer said; what is typed wrongly is refused beside it", () => {
    const draft = draftOf(cardOf(everything));
    const cleared = draftSchema.parse({ ...draft, figures: { ...draft.figures, gain: " ", jitterPpm: "" } });
    const { gain: _, jitterPpm: __, ...rest } = everything;
    expect(cleared.settings).toEqual(rest);
    expect(
      messagesOf({
        ...draft,
        figures: { ...draft.figures, gain: "0", redNoisePpm: "-5", mostCounts: "many" },
      }),
    ).toEqual({
      "figures.gain": "The gain is above zero.",
      "figures.redNoisePpm": "Noise is zero or more.",
      "figures.mostCounts": "“many” is not a number. Enter most counts in figures.",
    });
  });

  test("a blank altitude means space, any other blank figure is asked for", () => {
    const { figures, ...rest } = { ...emptyDraft(), name: "Heron" };
    const inSpace = draftSchema.parse({ ...rest, figures: { ...figures, siteAltitudeM: "" } });
    expect(inSpace.settings).toMatchObject({ siteAltitudeM: null });
    expect(messagesOf({ ...rest, figures: { ...figures, readNoise: " " } })).toEqual({
      "figures.readNoise": "Read noise is blank. Enter a number.",
    });
  });

  test("each refusal stands beside its field and says what to do", () => {
    const { figures, ...rest } = emptyDraft();
    const messages = messagesOf({
      ...rest,
      figures: { ...figures, throughput: "0,35", obstruction: "0.95", extinction: "9", floorPpm: "-1" },
    });
    expect(messages).toEqual({
      name: "Give it a name.",
      "figures.throughput": "“0,35”: use a point for decimals here (0.35).",
      "figures.obstruction": "The obstruction is a ratio of diameters, 0 to 0.9.",
      "figures.extinction": "Extinction is at most 5.",
      "figures.floorPpm": "Noise is zero or more.",
    });
  });

  test("limits the wrong way round are refused at the faint limit", () => {
    const { figures, ...rest } = { ...emptyDraft(), name: "Heron" };
    const messages = messagesOf({ ...rest, figures: { ...figures, brightLimit: "15", faintLimit: "9" } });
    expect(messages).toEqual({
      "figures.faintLimit": "The faint limit must be a larger magnitude than the bright limit.",
    });
  });

  test("another model keeps what both have and fills the rest", () => {
    const draft = { ...emptyDraft(), name: "Heron", figures: { ...emptyDraft().figures, floorPpm: "77" } };
    expect(draftSchema.parse(withModel(draft, "formula")).settings).toMatchObject({
      model: "formula",
      floorPpm: 77,
      referenceMagnitude: 10,
    });
  });

  test("a campaign names the field it cannot use", () => {
    const parsed = campaignSchema.safeParse({
      ...draftOfCampaign(null),
      name: "Autumn",
      duty: "1.5",
      leastTransits: "2.5",
      lengthDays: "",
    });
    const messages = Object.fromEntries(
      (parsed.error?.issues ?? []).map((issue) => [String(issue.path[0]), issue.message]),
    );
    expect(messages).toEqual({
      duty: "The share of time is at most 1.",
      leastTransits: "Transits needed is a whole number.",
      lengthDays: "Enter length as a number, with a point for decimals.",
    });
  });
});

describe("an opened card", () => {
  const open = async () => {
    const sent = answerWith(({ method, body }) =>
      method === "PUT"
        ? { status: 200, body: { card: { ...cardOf(everything), ...(body as object), number: 4 } } }
        : { status: 200, body: { cards: [], campaigns: [] } },
    );
    const client = createQueryClient();
    client.setQueryData(
      sessionOptions.queryKey,
      sessionOf({
        person: PERSON,
        programmes: [{ id: "9", name: "Sky", roles: ["instrument-team"], isInvented: false }],
      }),
    );
    const router = createMemoryRouter(
      [
        {
          path: "/programmes/:programmeId/instruments",
          element: (
            <Suspense>
              <CardEditor programmeId="9" card={cardOf(everything)} choice={null} onSaved={() => undefined} />
            </Suspense>
          ),
        },
      ],
      { initialEntries: ["/programmes/9/instruments"] },
    );
    render(
      <QueryClientProvider client={client}>
        <RouterProvider router={router} />
      </QueryClientProvider>,
    );
    await screen.findByRole("form", { name: "Figures of the card" });
    return sent;
  };

  test("is saved with every figure it came with and the one that was changed", async () => {
    const sent = await open();
    expect(screen.getByLabelText<HTMLSelectElement>("Scintillation").value).toBe("osborn");
    fireEvent.change(screen.getByLabelText("Red noise"), { target: { value: "95" } });
    fireEvent.click(screen.getByRole("button", { name: "Save version 4" }));
    await waitFor(() => expect(sent.some(({ method }) => method === "PUT")).toBe(true));
    expect(sent.find(({ method }) => method === "PUT")?.body).toEqual({
      name: "Heron",
      source: "a report",
      number: 3,
      settings: { ...everything, redNoisePpm: 95 },
    });
  });
});

describe("a word of caution", () => {
  test("stands near saturation, names what fills first, and leaves the last word to the observatory", () => {
    const brightest = brightestUsable(everything);
    const { rerender } = render(<SaturationNote card={everything} magnitude={brightest + 0.5} />);
    const note = screen.getByRole("note").textContent ?? "";
    expect(note).toContain("Near saturation.");
    // 65 535 counts of 1.5 electrons are fewer than the 100 000 that the pixel holds.
    expect(note).toContain("the converter reaches its largest number");
    expect(note).toContain("The observatory's own rules on bright stars go first.");
    rerender(<SaturationNote card={{ ...everything, gain: 2 }} magnitude={2} />);
    expect(screen.getByRole("note").textContent).toMatch(/Saturated.*the central pixel is full/);
    rerender(<SaturationNote card={everything} magnitude={brightest + 1.5} />);
    expect(screen.queryByRole("note")).toBeNull();
  });
});

describe("the picture of the noise", () => {
  test("has a line for every part, and none for a part that is zero", () => {
    const keys = Object.keys(noiseParts(everything, 12)).toSorted();
    expect(PARTS.map(({ key }) => key).toSorted()).toEqual(keys as (typeof PARTS)[number]["key"][]);
    const { rerender } = render(<NoisePlot card={{ ...everything, jitterPpm: 900 }} magnitude={12} />);
    for (const label of ["jitter", "red noise", "scintillation"])
      expect(screen.getByText(label)).toBeDefined();
    rerender(<NoisePlot card={detector} magnitude={12} />);
    expect(screen.queryByText("jitter")).toBeNull();
    expect(screen.queryByText("red noise")).toBeNull();
    expect(largestPart(noiseParts({ ...everything, jitterPpm: 1e5 }, 12))).toBe("pointing jitter is");
  });

  test("a saturated, a faint and a measured magnitude are told apart", () => {
    expect([6.9, 7, 14.5, 14.6].map((m) => usableAt(formula, m))).toEqual([
      "saturated",
      "usable",
      "usable",
      "too faint",
    ]);
    expect(usableAt({ ...detector, skyBrightness: -5 }, 10)).toBe("never");
  });

  test("the axes hold the whole total and plain ticks", () => {
    for (const card of [formula, detector]) {
      const axes = axesOf(card);
      expect(curve(card, "total", axes)).toHaveLength(161);
      for (const tick of noiseTicks(axes))
        expect(String(Number(tick.toPrecision(1)))).toMatch(/^0?\.?0*[13]0*$/);
      expect(noiseTicks(axes).length).toBeGreaterThan(2);
    }
  });

  test("names of lines never lie on each other and stay on the axis", () => {
    const places = spread([100, 101, 101, 400, 399, 20], 16, 400);
    const sorted = places.toSorted((a, b) => a - b);
    for (const [i, place] of sorted.entries())
      if (i > 0) expect(place - (sorted[i - 1] ?? 0)).toBeGreaterThanOrEqual(16);
    expect(Math.max(...places)).toBeLessThanOrEqual(400);
  });

  test("a part that is zero has no line", () => {
    const { container } = render(<NoisePlot card={formula} magnitude={10} />);
    expect(container.querySelectorAll("polyline")).toHaveLength(4);
    expect(screen.queryByText("scintillation")).toBeNull();
    expect(screen.getByText("photons")).toBeDefined();
    expect(container.querySelectorAll("circle")).toHaveLength(1);
  });

  test("the sentence and the table say the same numbers as the science", () => {
    const total = Math.round(noiseParts(formula, 12).total);
    render(
      <>
        <NoiseLede card={formula} magnitude={12} text="12.0" onText={() => undefined} />
        <NoiseNumbers card={formula} />
      </>,
    );
    expect(screen.getByText(`${total} ppm`)).toBeDefined();
    expect(screen.getByText(/the star's own photons are the largest part/)).toBeDefined();
    const row = screen.getByRole("row", { name: /^12 /, hidden: true });
    expect(within(row).getByText(String(total))).toBeDefined();
  });

  test("the precision table halves the noise of four times the time and shows the card's own aperture", () => {
    render(<PrecisionTable card={{ ...detector, apertureM: 0.25 }} magnitude={10} />);
    const cells = within(screen.getByRole("row", { name: /0\.25/ })).getAllByRole("cell");
    const [minute = 0, , hour = 0] = cells.map((cell) => Number(cell.textContent?.replace(/\s/g, "")));
    expect(minute / hour).toBeCloseTo(Math.sqrt(60), 1);
  });
});
