import type { Page } from "playwright-core";
import { beforeAll, expect, test } from "vitest";
import { openPage, withBrowser } from "#tests/support/browser.ts";
import { PASSWORD } from "#tests/support/factories.ts";
import {
  buildTraveller,
  CAMPAIGN_FIGURES,
  CARD_FIGURES,
  contentOf,
  expectExports,
  expectPracticeStars,
  gridRows,
  JOURNEY_MS,
  PRACTICE_FILE_THAT_ASKS,
  PREPARING,
  rowSum,
  type Traveller,
  waitForStars,
} from "#tests/support/journey.ts";
import { choose, enterOn, tabTo, typeInto } from "#tests/support/keyboard.ts";
import { type LiveApp, startLiveApp } from "#tests/support/live-app.ts";

withBrowser();
let app: LiveApp;
let traveller: Traveller;
beforeAll(async () => {
  app = await startLiveApp();
  traveller = await buildTraveller(app);
});

const button = (page: Page, name: string | RegExp) => page.getByRole("button", { name, exact: true });
const enterOnButton = (page: Page, name: string | RegExp): Promise<void> => enterOn(page, button(page, name));
const enterOnLink = (page: Page, name: string): Promise<void> =>
  enterOn(page, page.getByRole("link", { name, exact: true }).first());
const heading = (page: Page, name: string | RegExp): Promise<void> =>
  page.getByRole("heading", { name }).first().waitFor();

const signIn = async (page: Page): Promise<void> => {
  await page.goto("/");
  await typeInto(page, page.getByLabel("E-mail address"), traveller.person.email);
  await typeInto(page, page.getByLabel("Password", { exact: true }), PASSWORD);
  await page.keyboard.press("Enter");
  await page.getByRole("navigation", { name: "Screens of the programme" }).waitFor();
};

const readFile = async (page: Page): Promise<void> => {
  await enterOnLink(page, "Extracts");
  await enterOnButton(page, "Read file");
  const dialog = page.getByRole("dialog");
  await tabTo(page, dialog.getByLabel("Choose file"));
  const chooser = page.waitForEvent("filechooser");
  await page.keyboard.press("Enter");
  await (await chooser).setFiles(PRACTICE_FILE_THAT_ASKS);
  await enterOn(page, dialog.getByRole("button", { name: "Read file" }));
  await heading(page, "How should this file be read?");
};

const answerPlan = async (page: Page): Promise<void> => {
  await typeInto(page, page.getByLabel("Epoch as a year"), "2016.0");
  await page.keyboard.press("Enter");
  const questions = page.getByRole("region", { name: "Questions" });
  await enterOn(page, questions.getByRole("button", { name: "A mark for no value" }));
  await questions.getByText("Nothing is open.").waitFor();
  await enterOnButton(page, "Commit extract");
  await heading(page, /These stars are in edition 1/);
  expect(await rowSum(page)).toEqual([5, 3, 1, 1]);
};

const makeInstrument = async (page: Page): Promise<void> => {
  await enterOnLink(page, "Instruments");
  await enterOnButton(page, "Make a card");
  const form = page.getByRole("form", { name: "Figures of the card" });
  await choose(page, form.getByLabel("Noise from"), "formula");
  await choose(page, form.getByLabel("Magnitude from"), "card_mag");
  for (const [label, text] of CARD_FIGURES)
    await typeInto(page, form.getByLabel(label, { exact: true }), text);
  await page.keyboard.press("Enter");
  await heading(page, "Practice 30");
  await enterOnButton(page, "New campaign");
  const dialog = page.getByRole("dialog");
  for (const [label, text] of CAMPAIGN_FIGURES)
    await typeInto(page, dialog.getByLabel(label, { exact: true }), text);
  await choose(page, dialog.getByLabel("Shape of the signal"), "boxcar");
  await enterOn(page, dialog.getByRole("button", { name: "Make campaign" }));
  await button(page, "Edit 180 days").waitFor();
};

const changeMerit = async (page: Page): Promise<void> => {
  await enterOnLink(page, "Merit");
  const weight = page.getByRole("spinbutton", { name: "Weight" }).first();
  await tabTo(page, weight);
  await page.keyboard.press("ArrowUp");
  await page.keyboard.press("ArrowUp");
  expect(await weight.inputValue()).toBe("5");
  await enterOnButton(page, "Save as version 2");
  await page.getByText("Version 2, saved by").waitFor();
};

const lookAtStars = async (page: Page): Promise<void> => {
  await enterOnLink(page, "Catalogue");
  await waitForStars(page, ["LH-0052", "LH-0031", "LH-0077"]);
  await enterOnButton(page, "Columns");
  await tabTo(page, page.getByRole("dialog").getByLabel("Identifier", { exact: true }));
  await page.keyboard.press("Space");
  await page.keyboard.press("Escape");
  await expect.poll(async () => Object.keys((await gridRows(page))[0] ?? {})).toContain("Identifier");
  expectPracticeStars(await gridRows(page));
};

const addCut = async (page: Page, column: string, to: string): Promise<void> => {
  await enterOnButton(page, "Add a cut");
  const dialog = page.getByRole("dialog");
  await choose(page, dialog.getByLabel("Column"), column);
  await typeInto(page, dialog.getByLabel("To, not itself"), to);
  await page.keyboard.press("Enter");
};

const cut = async (page: Page): Promise<void> => {
  await addCut(page, "teff", "3600");
  await waitForStars(page, ["LH-0052", "LH-0031"]);
  await addCut(page, "ks_mag", "9");
  await waitForStars(page, ["LH-0031"]);
  await enterOnButton(page, /^Remove ks_mag/);
  await waitForStars(page, ["LH-0052", "LH-0031"]);
};

/** Sorts by the column that the arrow keys lead to from the first head. */
const sortBy = async (page: Page, label: string, times: number): Promise<void> => {
  const head = page.getByRole("columnheader", { name: new RegExp(`^(▲ |▼ )?${label}`) }).first();
  await page.keyboard.press("Home");
  for (let steps = 0; steps < 30; steps++) {
    if (await head.evaluate((element) => element === document.activeElement)) break;
    await page.keyboard.press("ArrowRight");
  }
  for (let i = 0; i < times; i++) {
    const before = await head.getAttribute("aria-sort");
    await page.keyboard.press("Enter");
    await expect.poll(() => head.getAttribute("aria-sort")).not.toBe(before);
  }
};

const sortAndOpenStar = async (page: Page): Promise<void> => {
  await tabTo(page, page.locator('[role="columnheader"][tabindex="0"]'));
  await sortBy(page, "Radius", 2);
  await waitForStars(page, ["LH-0031", "LH-0052"]);
  await sortBy(page, "Merit", 1);
  await waitForStars(page, ["LH-0052", "LH-0031"]);
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Enter");
  const sheet = page.getByRole("article", { name: "Star LH-0031" });
  await sheet.waitFor();
  await enterOnButton(page, "Close the star");
  await sheet.waitFor({ state: "detached" });
};

const makeList = async (page: Page): Promise<void> => {
  await enterOnButton(page, "Make a target list");
  const dialog = page.getByRole("dialog");
  await typeInto(page, dialog.getByLabel("Name"), "First two");
  await typeInto(page, dialog.getByLabel("First stars of the table"), "2");
  await page.keyboard.press("Enter");
  await heading(page, "First two");
  await waitForStars(page, ["LH-0052", "LH-0031"]);
};

const download = async (page: Page, name: string): Promise<string> => {
  const started = page.waitForEvent("download");
  await enterOnLink(page, name);
  return contentOf(await started);
};

test("from a file to a ranked list in a file, with the keyboard alone", { timeout: JOURNEY_MS }, async () => {
  const { page, finish } = await openPage({ url: app.url, expected: PREPARING });
  await signIn(page);
  await readFile(page);
  await answerPlan(page);
  await makeInstrument(page);
  await changeMerit(page);
  await lookAtStars(page);
  await cut(page);
  await sortAndOpenStar(page);
  await makeList(page);
  expectExports(await download(page, "Export CSV"), await download(page, "Export ECSV"));
  await finish();
});
