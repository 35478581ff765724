import type { Page } from "playwright-core";
import { PATIENCE_MS } from "./browser.ts";
import type { Furnished } from "./furnished.ts";

export interface ScreenAt {
  name: string;
  path: string;
  /** A heading that is there once the screen has what it shows. */
  ready: string;
}

/** Waits until a screen has drawn what it was asked for: its ready mark is there and nothing says it is loading. */
export const settle = async (page: Page, ready: string): Promise<void> => {
  await page.locator(ready).first().waitFor({ timeout: PATIENCE_MS });
  await page.waitForFunction(
    () =>
      document.querySelector('[aria-busy="true"]') === null &&
      ![...document.querySelectorAll('[role="status"]')].some((e) => e.textContent?.trim().endsWith("…")),
    undefined,
    { timeout: PATIENCE_MS },
  );
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
};

export const openScreen = async (page: Page, screen: ScreenAt): Promise<void> => {
  await page.goto(screen.path);
  await settle(page, screen.ready);
};

const inProgramme =
  (path: string | ((f: Furnished) => string)) =>
  (f: Furnished): string =>
    `/programmes/${f.programme.id}/${typeof path === "string" ? path : path(f)}`;

/** The screens of a furnished programme, every one with something on it. */
export const SCREENS: readonly (Omit<ScreenAt, "path"> & { path: (f: Furnished) => string })[] = [
  { name: "programmes", path: () => "/programmes", ready: "h1" },
  { name: "overview", path: inProgramme("overview"), ready: "h1" },
  { name: "extracts", path: inProgramme("extracts"), ready: "h1" },
  { name: "reading plan", path: inProgramme((f) => `extracts/${f.planning}`), ready: "h1" },
  {
    name: "rows of a file",
    path: inProgramme((f) => `extracts/${f.planning}?look=rows`),
    ready: '[role="tabpanel"] table',
  },
  {
    name: "sky of a file",
    path: inProgramme((f) => `extracts/${f.planning}?look=sky`),
    ready: '[role="tabpanel"] figure',
  },
  {
    name: "values of a column",
    path: inProgramme((f) => `extracts/${f.planning}?look=values&column=Ks`),
    ready: '[role="tabpanel"] table',
  },
  {
    name: "columns of an extract",
    path: inProgramme((f) => `extracts/${f.committed}?look=columns`),
    ready: "h1",
  },
  { name: "committed extract", path: inProgramme((f) => `extracts/${f.committed}`), ready: "h1" },
  {
    name: "catalogue",
    path: inProgramme((f) => `catalogue?${f.view}&cut=drop~cool~teff+%3C+3900&star=${f.star}`),
    ready: "article h2",
  },
  {
    name: "workings",
    path: inProgramme((f) => `catalogue?${f.view}&star=${f.star}&workings=r_min,radius`),
    ready: "article h2",
  },
  { name: "instruments", path: inProgramme("instruments"), ready: "h1" },
  { name: "merit", path: inProgramme("merit"), ready: "h1" },
  { name: "lists", path: inProgramme("lists"), ready: "h1" },
  { name: "list", path: inProgramme((f) => `lists/${f.list}`), ready: '[role="gridcell"]' },
  { name: "plan", path: inProgramme("plan"), ready: "h1" },
  { name: "logbook", path: inProgramme("logbook"), ready: "h1" },
  { name: "settings", path: inProgramme("settings"), ready: "h1" },
  {
    name: "recipe",
    path: inProgramme((f) => `settings/recipes/${f.programme.recipeVersionId}`),
    ready: "table",
  },
  {
    name: "form of a recipe",
    path: inProgramme((f) => `settings/recipes/${f.programme.recipeVersionId}?edit=copy`),
    ready: "form",
  },
  { name: "me", path: () => "/me", ready: "h1" },
];

/** The screen before anyone has signed in. */
export const SIGN_IN: ScreenAt = { name: "sign-in", path: "/sign-in", ready: "h1" };
