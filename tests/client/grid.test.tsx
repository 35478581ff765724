import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import { useState } from "react";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import { Grid, HEAD_HEIGHT } from "#src/ui/grid/grid.tsx";
import { LONGEST_TRACK_PX, scrollScale } from "#src/ui/grid/scroll-scale.ts";
import type { GridColumn, GridSort } from "#src/ui/grid/types.ts";

const ROW = 28;
/** Five rows under the head. */
const HEIGHT = HEAD_HEIGHT + 5 * ROW;

// Rendering under load is slow; nothing here waits for time to pass.
vi.setConfig({ testTimeout: 30_000 });

interface Row {
  name: string;
  teff: number;
}

const rowAt = (index: number): Row => ({ name: `SL ${index + 1}`, teff: 3000 + index });

const COLUMNS: GridColumn<Row>[] = [
  { key: "place", label: "#", width: 60, isFrozen: true, cell: () => "" },
  {
    key: "designation",
    label: "Star",
    width: 120,
    isFrozen: true,
    isRowHeader: true,
    isText: true,
    canSort: true,
    cell: (row) => row.name,
  },
  { key: "teff", label: "Teff", unit: "K", width: 90, canSort: true, cell: (row) => String(row.teff) },
];

/** The test's document has no layout: the grid is told its height, and a set scroll place is told as browsers do. */
beforeEach(() => {
  const places = new WeakMap<Element, number>();
  vi.spyOn(HTMLElement.prototype, "offsetHeight", "get").mockReturnValue(HEIGHT);
  vi.spyOn(HTMLElement.prototype, "offsetWidth", "get").mockReturnValue(600);
  vi.spyOn(HTMLElement.prototype, "clientHeight", "get").mockReturnValue(HEIGHT);
  vi.spyOn(Element.prototype, "scrollTop", "get").mockImplementation(function (this: Element) {
    return places.get(this) ?? 0;
  });
  vi.spyOn(Element.prototype, "scrollTop", "set").mockImplementation(function (this: Element, value: number) {
    places.set(this, value);
    this.dispatchEvent(new Event("scroll"));
  });
});
afterEach(cleanup);

interface Options {
  count?: number;
  onOpen?: (row: Row) => void;
  onSort?: (key: string) => void;
  onRange?: (first: number, last: number, focused: number) => void;
  onGoToRow?: () => void;
  at?: (index: number) => Row | undefined;
  sort?: GridSort;
  rowHeight?: number;
}

const Table = ({ count = 1000, ...options }: Options) => {
  const [onRange] = useState(() => options.onRange ?? (() => undefined));
  return (
    <Grid
      label="Stars"
      columns={COLUMNS}
      count={count}
      rowAt={options.at ?? rowAt}
      rowKey={(row) => row.name}
      rowLabel={(row) => row.name}
      rowHeight={options.rowHeight ?? ROW}
      sort={options.sort ?? { key: "teff", direction: "desc" }}
      onSort={options.onSort ?? (() => undefined)}
      onOpen={options.onOpen ?? (() => undefined)}
      openKey={null}
      onRange={onRange}
      onGoToRow={options.onGoToRow ?? (() => undefined)}
    />
  );
};

const press = (key: string, more: KeyboardEventInit = {}) =>
  act(() => {
    fireEvent.keyDown(document.activeElement ?? document.body, { key, ...more });
  });

/** Row (−1 is the head) and column that hold the focus. */
const focused = (): [row: number, column: number] => {
  const { row, column } = (document.activeElement as HTMLElement).dataset;
  return [Number(row), Number(column)];
};

const enter = () => act(() => document.querySelector<HTMLElement>('[role="columnheader"]')?.focus());

describe("keys of the grid", () => {
  test("one tab stop, which the arrows move", () => {
    const { container } = render(<Table />);
    const stops = () => container.querySelectorAll('[tabindex="0"]');
    expect(stops()).toHaveLength(1);
    enter();
    press("ArrowDown");
    press("ArrowRight");
    press("ArrowDown");
    expect(focused()).toEqual([1, 1]);
    expect(stops()).toHaveLength(1);
    expect(stops()[0]).toBe(document.activeElement);
    press("ArrowLeft");
    press("ArrowLeft");
    press("ArrowUp");
    expect(focused()).toEqual([0, 0]);
  });

  test("Home and End go along the row, with Ctrl to the ends of the table", () => {
    render(<Table />);
    enter();
    press("ArrowDown");
    press("End");
    expect(focused()).toEqual([0, 2]);
    press("Home");
    expect(focused()).toEqual([0, 0]);
    press("End", { ctrlKey: true });
    expect(focused()).toEqual([999, 2]);
    press("ArrowDown");
    expect(focused()).toEqual([999, 2]);
    press("Home", { ctrlKey: true });
    expect(focused()).toEqual([0, 0]);
  });

  test("PageDown and PageUp move by the rows of one view", () => {
    render(<Table />);
    enter();
    press("ArrowDown");
    press("PageDown");
    expect(focused()).toEqual([4, 0]);
    press("PageUp");
    expect(focused()).toEqual([0, 0]);
  });

  test("Enter opens a row and sorts by a head; Ctrl+G asks for a row", () => {
    const onOpen = vi.fn();
    const onSort = vi.fn();
    const onGoToRow = vi.fn();
    render(<Table onOpen={onOpen} onSort={onSort} onGoToRow={onGoToRow} />);
    enter();
    press("Enter");
    expect(onSort, "the number of a row orders nothing").not.toHaveBeenCalled();
    press("ArrowRight");
    press("Enter");
    expect(onSort).toHaveBeenCalledExactlyOnceWith("designation");
    press("ArrowDown");
    press("ArrowDown");
    press("Enter");
    expect(onOpen).toHaveBeenCalledExactlyOnceWith({ name: "SL 2", teff: 3001 });
    press("g", { ctrlKey: true });
    expect(onGoToRow).toHaveBeenCalledOnce();
  });
});

describe("what the grid tells", () => {
  test("counts with the head, indices from 1, the sorted column alone", () => {
    render(<Table count={5} />);
    const grid = screen.getByRole("grid", { name: "Stars" });
    expect(grid.getAttribute("aria-rowcount")).toBe("6");
    expect(grid.getAttribute("aria-colcount")).toBe("3");
    expect(screen.getAllByRole("row").map((row) => row.getAttribute("aria-rowindex"))).toEqual([
      "1",
      "2",
      "3",
      "4",
      "5",
      "6",
    ]);
    const sorted = screen.getAllByRole("columnheader").map((head) => head.getAttribute("aria-sort"));
    expect(sorted).toEqual([null, null, "descending"]);
    expect(screen.getAllByRole("rowheader").map((cell) => cell.textContent)).toContain("SL 3");
  });

  test("a row that is still being read says so", () => {
    render(<Table count={3} at={(index) => (index === 1 ? undefined : rowAt(index))} />);
    expect(screen.getAllByRole("rowheader").map((cell) => cell.textContent)).toEqual([
      "SL 1",
      "loading",
      "SL 3",
    ]);
  });

  test("the rows that are in view, not those kept ready beside them", () => {
    const onRange = vi.fn();
    render(<Table onRange={onRange} />);
    expect(onRange).toHaveBeenLastCalledWith(0, 4, -1);
    const grid = screen.getByRole("grid");
    act(() => {
      grid.scrollTop = 100 * ROW;
    });
    expect(onRange).toHaveBeenLastCalledWith(100, 104, -1);
  });
});

describe("the row that holds the focus", () => {
  test("stays mounted when the table is scrolled far away", () => {
    const onRange = vi.fn();
    render(<Table onRange={onRange} />);
    enter();
    press("ArrowDown");
    press("ArrowDown");
    const cell = document.activeElement;
    act(() => {
      screen.getByRole("grid").scrollTop = 800 * ROW;
    });
    expect(screen.getByText("SL 801")).toBeDefined();
    expect(screen.queryByText("SL 30")).toBeNull();
    expect(document.activeElement).toBe(cell);
    expect(cell?.isConnected).toBe(true);
    expect(onRange).toHaveBeenLastCalledWith(800, 804, 1);
  });

  test("gives the focus to the last row when it is no longer in the result", () => {
    const { rerender } = render(<Table />);
    enter();
    press("End", { ctrlKey: true });
    expect(focused()).toEqual([999, 2]);
    act(() => rerender(<Table count={7} />));
    expect(focused()).toEqual([6, 2]);
  });
});

describe("a table taller than browsers allow", () => {
  test("its last row can be reached, by key and by scrollbar", () => {
    render(<Table count={2_000_000} />);
    const grid = screen.getByRole("grid");
    enter();
    press("End", { ctrlKey: true });
    expect(focused()).toEqual([1_999_999, 2]);
    press("Home", { ctrlKey: true });
    act(() => {
      grid.scrollTop = LONGEST_TRACK_PX - (HEIGHT - HEAD_HEIGHT);
    });
    const last = screen.getByText("SL 2000000").closest('[role="row"]');
    expect(last?.getAttribute("aria-rowindex")).toBe("2000001");
    // Drawn where the end of the track is, not past it.
    const top = Number(/translateY\(([\d.]+)px\)/.exec((last as HTMLElement).style.transform)?.[1]);
    expect(top + ROW).toBeCloseTo(LONGEST_TRACK_PX, 3);
  });

  test("a notch of the wheel moves three rows", () => {
    const onRange = vi.fn();
    render(<Table count={2_000_000} onRange={onRange} />);
    const grid = screen.getByRole("grid");
    const notch = () => act(() => void fireEvent.wheel(grid, { deltaY: 100, deltaMode: 0 }));
    notch();
    notch();
    expect(onRange).toHaveBeenLastCalledWith(6, 10, -1);
  });

  test("a table that fits is not scaled", () => {
    expect(scrollScale(LONGEST_TRACK_PX, 560)).toEqual({ track: LONGEST_TRACK_PX, factor: 1 });
    const { track, factor } = scrollScale(2_000_000 * ROW, 560);
    expect((track - 560) * factor + 560).toBeCloseTo(2_000_000 * ROW, 3);
  });
});

test("another order begins at its first row", () => {
  const onRange = vi.fn();
  const { rerender } = render(<Table onRange={onRange} />);
  act(() => {
    screen.getByRole("grid").scrollTop = 500 * ROW;
  });
  expect(onRange).toHaveBeenLastCalledWith(500, 504, -1);
  act(() => rerender(<Table sort={{ key: "designation", direction: "asc" }} />));
  expect(onRange).toHaveBeenLastCalledWith(0, 4, -1);
});

test("rows of another height lie under each other again", () => {
  const { rerender } = render(<Table />);
  const top = () => screen.getByText("SL 3").closest<HTMLElement>('[role="row"]')?.style.transform;
  expect(top()).toBe(`translateY(${2 * ROW}px)`);
  act(() => rerender(<Table rowHeight={36} />));
  expect(top()).toBe("translateY(72px)");
});
