import { QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, within } from "@testing-library/react";
import { useState } from "react";
import { afterEach, describe, expect, test, vi } from "vitest";
import { drawStar } from "#server/workings/draws.ts";
import { explain, type Subject } from "#server/workings/explain.ts";
import type { StarSheet } from "#shared/api/stars.ts";
import type { Workings } from "#shared/api/workings.ts";
import { EMPTY_VIEW } from "#shared/catalogue/view.ts";
import { workingsText } from "#shared/format/workings-text.ts";
import { PRACTICE_RECIPE } from "#shared/science/recipes.ts";
import { createQueryClient } from "#src/app/query-client.ts";
import { everyDigit, figure, unitText } from "#src/features/workbench/workings/figures.ts";
import { Formula } from "#src/features/workbench/workings/formula.tsx";
import { WorkingsPanel } from "#src/features/workbench/workings/workings-panel.tsx";
import { PRACTICE_CAMPAIGN, PRACTICE_CARD, PRACTICE_STARS } from "#tests/unit/derive/practice-stars.ts";
import { answerWith, refusal } from "./people/support.tsx";

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const SUBJECT: Subject = {
  given: { ...PRACTICE_STARS.A, parallax_err: 0.05, ks_mag_err: 0.02 },
  recipe: PRACTICE_RECIPE.settings,
  card: PRACTICE_CARD,
  campaign: PRACTICE_CAMPAIGN,
};

const star: StarSheet = {
  id: "77",
  designation: "LH-0031",
  sourceId: null,
  release: null,
  place: 1,
  count: 3,
  values: {},
  blanks: {},
  flagBits: 0,
  merit: null,
  shares: [],
  methods: {},
  entries: [
    {
      extractId: "1",
      extractNumber: 2,
      extractName: "Practice stars",
      rowNumber: 14,
      designation: "LH-0031",
      sourceId: null,
      release: null,
      values: { ks_mag: 7.912, parallax: 60 },
    },
  ],
  droppedBy: [],
  reach: [],
  changedAt: null,
};

/** What the server answers to a request for workings. */
const answerOf = (path: string, subject: Subject): Workings => {
  const query = new URLSearchParams(path.split("?")[1]);
  const [draws, seed] = [Number(query.get("draws")), Number(query.get("seed"))];
  return {
    star: "LH-0031",
    recipe: "Practice v1",
    card: "Practice 30 v1",
    campaign: "180 days v1",
    steps: explain(subject, query.get("key") ?? ""),
    drawn: query.has("draws")
      ? {
          draws,
          seed,
          intervals: drawStar(subject.given, subject.recipe, { ...subject, draws, seed }),
        }
      : null,
  };
};

/** Keeps the trail, as the address does. */
const Host = ({ first, onClose }: { first: string; onClose: () => void }) => {
  const [trail, setTrail] = useState<readonly string[]>([first]);
  const [client] = useState(createQueryClient);
  return (
    <QueryClientProvider client={client}>
      <WorkingsPanel
        programmeId="5"
        view={EMPTY_VIEW}
        star={star}
        trail={trail}
        onTrail={setTrail}
        onClose={onClose}
      />
    </QueryClientProvider>
  );
};

const open = (key: string, subject = SUBJECT) => {
  const onClose = vi.fn();
  const sent = answerWith(({ path }) => ({ status: 200, body: { workings: answerOf(path, subject) } }));
  render(<Host first={key} onClose={onClose} />);
  return { sent, onClose };
};

const opened = (label: string) => screen.findByRole("article", { name: `Workings of ${label}, LH-0031` });

describe("the panel of workings", () => {
  test("leads from a number down to what an extract gives, and back to the link it came by", async () => {
    const { onClose } = open("radius");
    const radius = await opened("Radius");
    expect(document.activeElement?.textContent).toBe("Radius");
    // Mann et al. 2015, ApJ 804, 64, Table 1 with the erratum 2016.
    expect(within(radius).getByLabelText("1.9515 - 0.352 * M_Ks + 0.0168 * M_Ks^2")).toBeDefined();
    expect(radius.textContent).toContain("0.334 ± 0.010 R☉");
    expect(radius.textContent).toContain("2.89 %");
    expect(radius.textContent).toMatch(/Inside: holds for MKs from 4.6 to 9.8; here it is 6.802756/);
    expect(radius.textContent).toContain("Practice 30 v1");

    fireEvent.click(within(radius).getByRole("button", { name: /workings of the absolute magnitude in Ks/ }));
    const magnitude = await opened("M Ks");
    expect(magnitude.textContent).toContain("7.912 ± 0.020 mag");
    expect(magnitude.textContent).toContain("Ks magnitude: given by extract 2, Practice stars, row 14");

    fireEvent.click(within(magnitude).getByRole("button", { name: "Back to Radius" }));
    await opened("Radius");
    expect(document.activeElement?.getAttribute("data-workings")).toBe("abs_ks");
    fireEvent.click(screen.getByRole("button", { name: "Back to LH-0031" }));
    expect(onClose).toHaveBeenCalledOnce();
  });

  test("says of a blank why it is one and which range was missed", async () => {
    // As bright as a giant: M Ks is −1.27 by the definition of absolute magnitude.
    open("radius", { ...SUBJECT, given: { ...SUBJECT.given, ks_mag: 3, parallax: 14 } });
    const panel = await opened("Radius");
    expect(panel.textContent).toContain("Blank: out of range");
    expect(panel.textContent).toMatch(/Outside: holds for MKs from 4.6 to 9.8; here it is −1.26/);
  });

  test("copies the text that redoes the number by hand, from the step that is shown", async () => {
    const writeText = vi.fn(async () => undefined);
    vi.stubGlobal("navigator", { clipboard: { writeText } });
    open("radius");
    const panel = await opened("Radius");
    fireEvent.click(within(panel).getByRole("button", { name: /workings of the absolute magnitude in Ks/ }));
    await opened("M Ks");
    fireEvent.click(screen.getByRole("button", { name: "Copy as text" }));
    expect(await screen.findByText("Copied, with every digit.")).toBeDefined();
    expect(writeText).toHaveBeenCalledExactlyOnceWith(workingsText(answerOf("?key=abs_ks", SUBJECT)));
  });

  test("shows the text where the browser does not let it be copied", async () => {
    vi.stubGlobal("navigator", {});
    open("abs_ks");
    await opened("M Ks");
    fireEvent.click(screen.getByRole("button", { name: "Copy as text" }));
    const area = await screen.findByLabelText<HTMLTextAreaElement>(/did not let it be copied/);
    expect(area.value).toContain("Ks + 5 - 5 * log10(d) - A_Ks");
  });

  test("draws on demand with the seed that is written, beside the error of first order", async () => {
    const { sent } = open("radius");
    await opened("Radius");
    expect(sent).toHaveLength(1);
    fireEvent.change(screen.getByLabelText("Seed"), { target: { value: "7" } });
    fireEvent.click(screen.getByRole("button", { name: /Draw/ }));
    const table = await screen.findByRole("table", { name: /Interval by draws/ });
    expect(sent[1]?.path).toContain("draws=1000&seed=7");
    expect(table.textContent).toContain("50 %0.334 R☉0.334 R☉");
    expect(table.parentElement?.textContent).toContain("1\u2009000 draws, seed 7");
  });

  test("refuses a seed that is none, and says which input has no error", async () => {
    const { ks_mag_err: _, ...given } = SUBJECT.given;
    const { sent } = open("radius", { ...SUBJECT, given });
    await opened("Radius");
    fireEvent.change(screen.getByLabelText("Seed"), { target: { value: "0.5" } });
    fireEvent.click(screen.getByRole("button", { name: /Draw/ }));
    expect(screen.getByText(/A seed is a whole number/)).toBeDefined();
    expect(sent).toHaveLength(1);
    fireEvent.change(screen.getByLabelText("Seed"), { target: { value: "5" } });
    fireEvent.click(screen.getByRole("button", { name: /Draw/ }));
    expect(await screen.findByText(/No interval: no error is given for .*Ks magnitude/)).toBeDefined();
  });

  test("says what went wrong, and how to go on", async () => {
    const onClose = vi.fn();
    answerWith(() => ({ status: 404, body: refusal("not-found", "This quantity does not exist.") }));
    render(<Host first="nothing" onClose={onClose} />);
    expect(screen.getByRole("status").textContent).toBe("Reading the workings…");
    expect((await screen.findByRole("alert")).textContent).toContain("This quantity does not exist.");
    fireEvent.click(screen.getByRole("button", { name: "Back to LH-0031" }));
    expect(onClose).toHaveBeenCalledOnce();
  });
});

describe("how formulas and numbers are set", () => {
  test.each([
    ["sqrt(M_Ks^2 - 1) * 10^(-0.4 * m)", "√(MKs2 − 1) · 10−0.4 · m"],
    ["floor(length / P_E)", "⌊length / PE⌋"],
    ["-sigma_ph + plx", "−σph + ϖ"],
    ["log10(1e-12 * pi)", "log₁₀(10⁻¹² · π)"],
  ])("%s", (text, set) => {
    render(<Formula text={text} />);
    expect(screen.getByRole("math", { name: text }).textContent).toBe(set);
  });

  test("a number is read to seven digits and copied with all", () => {
    expect(figure(6.802756251918217)).toBe("6.802756");
    expect(figure(-2.5e-9)).toBe("−2.5 × 10⁻⁹");
    expect(everyDigit(6.802756251918217)).toBe("6.802756251918217");
  });

  test("a unit is spelt as people write it", () => {
    expect(unitText("s-1.cm-2.Angstrom-1")).toBe("s⁻¹ cm⁻² Å⁻¹");
    expect(unitText("solRad")).toBe("R☉");
    expect(unitText("")).toBe("");
  });
});
