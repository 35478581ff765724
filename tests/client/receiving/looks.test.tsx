import { fireEvent, screen } from "@testing-library/react";
import { expect, test } from "vitest";
import { LookTabs } from "#src/features/receiving/look-tabs.tsx";
import { openAt } from "../people/support.tsx";

const LOOKS = ["one", "two", "three"].map((key) => ({
  key,
  label: key,
  show: () => <p>{`This is ${key}.`}</p>,
}));

const tab = (name: string): HTMLElement => screen.getByRole("tab", { name });

test("the address says which look is open", async () => {
  openAt("/?look=two", <LookTabs label="Looks" looks={LOOKS} />);
  await screen.findByText("This is two.");
  expect(tab("two").getAttribute("aria-selected")).toBe("true");
  expect(screen.getByRole("tabpanel", { name: "two" })).toBeTruthy();
});

test("arrows, Home and End go from look to look, however fast", async () => {
  openAt("/", <LookTabs label="Looks" looks={LOOKS} />);
  await screen.findByText("This is one.");
  tab("one").focus();
  for (const [key, name] of [
    ["ArrowRight", "two"],
    ["ArrowRight", "three"],
    ["ArrowRight", "one"],
    ["ArrowLeft", "three"],
    ["Home", "one"],
    ["End", "three"],
  ] as const) {
    fireEvent.keyDown(document.activeElement ?? document.body, { key });
    expect(document.activeElement).toBe(tab(name));
  }
  await screen.findByText("This is three.");
});
