import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { useState } from "react";
import { afterEach, expect, test } from "vitest";
import { RecipeOrder } from "#src/features/settings/recipe-order.tsx";

afterEach(cleanup);

const OPTIONS = ["one", "two", "three"].map((value) => ({ value, label: `Way ${value}` }));

const Place = () => {
  const [chosen, setChosen] = useState<readonly string[]>(["one", "two", "three"]);
  return (
    <form aria-label="Form">
      <RecipeOrder label="Ways" name="ways" options={OPTIONS} chosen={chosen} onChange={setChosen} />
    </form>
  );
};

const order = (): string[] =>
  screen.getAllByRole("listitem").map((item) => /Way (\w+)/.exec(item.textContent ?? "")?.[1] ?? "");
const focused = (): string | null => document.activeElement?.getAttribute("aria-label") ?? null;

/** As Enter, space and the mouse do it: the button has the focus and is pressed. */
const press = (name: string): void => {
  const button = screen.getByRole("button", { name });
  button.focus();
  fireEvent.click(button);
};

test("a part moves up to the top and the focus goes with it", () => {
  render(<Place />);
  press("Move Way three up");
  expect(order()).toEqual(["one", "three", "two"]);
  expect(focused()).toBe("Move Way three up");
  press("Move Way three up");
  expect(order()).toEqual(["three", "one", "two"]);
  // At the top there is no way further up: the button beside it takes the focus.
  expect(focused()).toBe("Move Way three down");
});

test("a part can be left out, and taken in again at the end", () => {
  render(<Place />);
  press("Leave out Way two");
  expect(order()).toEqual(["one", "three"]);
  press("Take in Way two");
  expect(order()).toEqual(["one", "three", "two"]);
});

test("the list is a field of the form, so that a refusal can lead to it", () => {
  render(<Place />);
  const form = screen.getByRole("form", { name: "Form" });
  expect((form as HTMLFormElement).elements.namedItem("ways")).toBe(
    screen.getByRole("group", { name: "Ways" }),
  );
});
