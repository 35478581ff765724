import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import { createMemoryRouter, RouterProvider } from "react-router-dom";
import { afterEach, describe, expect, test, vi } from "vitest";
import { EMPTY_VIEW } from "#shared/catalogue/view.ts";
import { CutDialog } from "#src/features/workbench/cut-dialog.tsx";
import { drawTransit } from "#src/features/workbench/transit-model.ts";
import { useWorkbench, type Workbench } from "#src/features/workbench/use-workbench.ts";

vi.setConfig({ testTimeout: 30_000 });
afterEach(cleanup);

/** About the practice star B: a small cool star seen by an instrument. */
const VALUES = {
  radius: 0.2,
  teff: 3000,
  earth_distance: 0.05,
  earth_period: 9,
  transit_duration: 1.3,
  noise_1h: 200,
  transits: 16,
};

describe("the transit that is drawn", () => {
  test("is deeper in the middle than the discs alone, by limb darkening, and flat outside", () => {
    const drawn = drawTransit("7", VALUES);
    const discs = 1e6 / (109.0764 * 0.2) ** 2;
    expect(drawn?.depthPpm).toBeGreaterThan(discs);
    expect(drawn?.depthPpm).toBeLessThan(1.3 * discs);
    expect(drawn?.curve[0]?.[1]).toBe(0);
    expect(drawn?.curve.at(-1)?.[1]).toBe(0);
  });

  test("lasts as long as the table says", () => {
    const inside = drawTransit("7", VALUES)?.curve.filter(([, ppm]) => ppm > 0) ?? [];
    const hours = (inside.at(-1)?.[0] ?? 0) - (inside[0]?.[0] ?? 0);
    // First to last contact adds the planet's own size to the centre's crossing of 1.3 h.
    expect(hours).toBeGreaterThan(1.3);
    expect(hours).toBeLessThan(1.5);
  });

  test("loses depth to the light of neighbours", () => {
    const alone = drawTransit("7", VALUES)?.depthPpm ?? 0;
    expect(drawTransit("7", { ...VALUES, light_share: 0.5 })?.depthPpm).toBeCloseTo(alone / 2, 6);
  });

  test("scatters less the more transits are folded, and the same each time", () => {
    const one = drawTransit("7", { ...VALUES, transits: 1 });
    const many = drawTransit("7", VALUES);
    expect(one?.dotPpm).toBeCloseTo(4 * (many?.dotPpm ?? 0), 6);
    expect(drawTransit("7", VALUES)?.dots).toEqual(many?.dots);
    expect(drawTransit("8", VALUES)?.dots).not.toEqual(many?.dots);
  });

  test("is left out where an input is blank, and stands without noise where no instrument sees the star", () => {
    expect(drawTransit("7", { ...VALUES, radius: undefined })).toBeNull();
    expect(drawTransit("7", { ...VALUES, teff: 9000 })).toBeNull();
    expect(drawTransit("7", { ...VALUES, noise_1h: undefined })?.dots).toEqual([]);
  });
});

describe("the dialog for a cut", () => {
  const open = () => {
    HTMLDialogElement.prototype.showModal ??= () => undefined;
    const onSave = vi.fn();
    render(<CutDialog cut={null} onSave={onSave} onClose={() => undefined} />);
    return onSave;
  };
  const type = (label: string, value: string) =>
    fireEvent.change(screen.getByLabelText(label), { target: { value } });
  const add = () => fireEvent.click(screen.getByText("Add the cut"));

  test("makes a condition of a range; its upper end is left out and blanks are dropped unless asked", () => {
    const onSave = open();
    type("From", "2600");
    type("To, not itself", "3900");
    add();
    expect(onSave).toHaveBeenCalledExactlyOnceWith({
      label: "",
      expression: "2600 <= teff < 3900",
      blanks: "drop",
    });
  });

  test("takes a formula and the word that blanks stay", () => {
    const onSave = open();
    fireEvent.click(screen.getByText("Write as formula"));
    type("Condition", "ruwe < 1.4");
    type("Stars for which a value is blank", "keep");
    type("Name (optional)", "Clean astrometry");
    add();
    expect(onSave).toHaveBeenCalledExactlyOnceWith({
      label: "Clean astrometry",
      expression: "ruwe < 1.4",
      blanks: "keep",
    });
  });

  test("says what is wrong instead of saving it", () => {
    const onSave = open();
    add();
    expect(screen.getByText(/Say what the cut asks/)).toBeDefined();
    fireEvent.click(screen.getByText("Write as formula"));
    type("Condition", "ruwe <");
    add();
    expect(screen.getByLabelText("Condition").getAttribute("aria-invalid")).toBe("true");
    expect(onSave).not.toHaveBeenCalled();
  });
});

let workbench: Workbench | undefined;
const Probe = () => {
  workbench = useWorkbench("1");
  return null;
};

describe("the address", () => {
  const openAt = (search: string) => {
    const router = createMemoryRouter([{ path: "/", Component: Probe }], { initialEntries: [`/${search}`] });
    render(
      <QueryClientProvider client={new QueryClient()}>
        <RouterProvider router={router} />
      </QueryClientProvider>,
    );
    const now = (): Workbench => {
      if (!workbench) throw new Error("The probe was not rendered.");
      return workbench;
    };
    return { router, now };
  };

  test("holds the whole question and what stands beside it, and gives them back", async () => {
    const { router, now } = openAt("?sort=teff");
    expect(now().view).toEqual({ ...EMPTY_VIEW, sort: { key: "teff", direction: "asc" } });
    const cuts = [{ label: "Near", expression: "distance < 30", blanks: "drop" as const }];
    await act(async () => now().ask({ card: "5", cuts }));
    await act(async () =>
      now().show({
        star: "77",
        workings: ["r_min", "radius"],
        columns: ["teff", "radius"],
        isSexagesimal: true,
      }),
    );
    const again = openAt(router.state.location.search).now();
    expect(again.view).toEqual({ ...EMPTY_VIEW, card: "5", cuts, sort: { key: "teff", direction: "asc" } });
    expect(again.screen).toEqual({
      star: "77",
      workings: ["r_min", "radius"],
      columns: ["teff", "radius"],
      find: "",
      isSexagesimal: true,
    });
  });

  test("another question is a step that Back undoes; a switch beside it is not", async () => {
    const { router, now } = openAt("?sort=teff");
    await act(async () => now().ask({ sort: { key: "radius", direction: "desc" } }));
    expect(router.state.historyAction).toBe("PUSH");
    await act(async () => now().show({ isSexagesimal: true }));
    expect(router.state.historyAction).toBe("REPLACE");
    await act(async () => router.navigate(-1));
    expect(now().view.sort).toEqual({ key: "teff", direction: "asc" });
    expect(now().screen.isSexagesimal).toBe(false);
  });

  test("parts that cannot be read are named, the rest holds", () => {
    const { now } = openAt("?sort=teff&card=five&columns=teff,nothing_here");
    expect(now().unread).toEqual(["card"]);
    expect(now().view.card).toBeNull();
    expect(now().screen.columns).toEqual(["teff"]);
  });
});
