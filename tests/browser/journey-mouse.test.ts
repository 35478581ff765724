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
import { type LiveApp, startLiveApp } from "#tests/support/live-app.ts";

withBrowser();
let app: LiveApp;
let traveller: Traveller;
beforeAll(async () => {
  app = await startLiveApp();
  traveller = await buildTraveller(app);
});

const press = (page: Page, name: string | RegExp): Promise<void> =>
  page.getByRole("button", { name, exact: true }).last().click();
const follow = (page: Page, name: string): Promise<void> =>
  page.getByRole("link", { name, exact: true }).first().click();
const heading = (page: Page, name: string | RegExp): Promise<void> =>
  page.getByRole("heading", { name }).first().waitFor();

const signIn = async (page: Page): Promise<void> => {
  await page.goto("/");
  await page.getByLabel("E-mail address").fill(traveller.person.email);
  await page.getByLabel("Password", { exact: true }).fill(PASSWORD);
  await press(page, "Sign in");
  await page.getByRole("navigation", { name: "Screens of the programme" }).waitFor();
};

const readFile = async (page: Page): Promise<void> => {
  await follow(page, "Extracts");
  await press(page, "Read file");
  const chooser = page.waitForEvent("filechooser");
  await page.getByText("Choose file").click();
  await (await chooser).setFiles(PRACTICE_FILE_THAT_ASKS);
  await page.getByRole("dialog").getByRole("button", { name: "Read file" }).click();
  await heading(page, "How should this file be read?");
};

const answerPlan = async (page: Page): Promise<void> => {
  const commit = page.getByRole("button", { name: "Commit extract" });
  expect(await commit.isDisabled()).toBe(true);
  await page.getByLabel("Epoch as a year").fill("2016.0");
  await press(page, "Set epoch");
  await page
    .getByRole("region", { name: "Questions" })
    .getByRole("button", { name: "A mark for no value" })
    .click();
  await page.getByText("Nothing is open.").waitFor();
  await commit.click();
  await heading(page, /These stars are in edition 1/);
  expect(await rowSum(page)).toEqual([5, 3, 1, 1]);
};

const makeInstrument = async (page: Page): Promise<void> => {
  await follow(page, "Instruments");
  await press(page, "Make a card");
  const form = page.getByRole("form", { name: "Figures of the card" });
  await form.getByLabel("Noise from").selectOption({ label: "A noise curve in three terms" });
  await form.getByLabel("Magnitude from").selectOption("card_mag");
  for (const [label, text] of CARD_FIGURES) await form.getByLabel(label, { exact: true }).fill(text);
  await press(page, "Make card");
  await heading(page, "Practice 30");
  await press(page, "New campaign");
  const dialog = page.getByRole("dialog");
  for (const [label, text] of CAMPAIGN_FIGURES) await dialog.getByLabel(label, { exact: true }).fill(text);
  await dialog.getByLabel("Shape of the signal").selectOption("boxcar");
  await press(page, "Make campaign");
  await page.getByText("180 days").first().waitFor();
};

const changeMerit = async (page: Page): Promise<void> => {
  await follow(page, "Merit");
  const weight = page.getByRole("spinbutton", { name: "Weight" }).first();
  expect(await weight.inputValue()).toBe("4");
  await page.getByRole("button", { name: "Weight more by 0.5" }).first().click();
  await weight.fill("5");
  await press(page, "Save as version 2");
  await page.getByText("Version 2, saved by").waitFor();
};

const lookAtStars = async (page: Page): Promise<void> => {
  await follow(page, "Catalogue");
  await waitForStars(page, ["LH-0052", "LH-0031", "LH-0077"]);
  await press(page, "Columns");
  await page.getByRole("dialog").getByLabel("Identifier", { exact: true }).click();
  await press(page, "Show the table");
  await expect.poll(async () => Object.keys((await gridRows(page))[0] ?? {})).toContain("Identifier");
  expectPracticeStars(await gridRows(page));
};

const addCut = async (page: Page, column: string, to: string): Promise<void> => {
  await press(page, "Add a cut");
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Column").selectOption(column);
  await dialog.getByLabel("To, not itself").fill(to);
  await press(page, "Add the cut");
};

const head = (page: Page, name: string) =>
  page.getByRole("columnheader", { name: new RegExp(`^(▲ |▼ )?${name}`) }).first();

const cutAndSort = async (page: Page): Promise<void> => {
  await addCut(page, "teff", "3600");
  await waitForStars(page, ["LH-0052", "LH-0031"]);
  await addCut(page, "ks_mag", "9");
  await waitForStars(page, ["LH-0031"]);
  await page.getByRole("button", { name: /^Remove ks_mag/ }).click();
  await waitForStars(page, ["LH-0052", "LH-0031"]);
  expect(((await page.getByRole("heading", { level: 1 }).textContent()) ?? "").replace(/\s+/g, " ")).toMatch(
    /^3 stars in edition 1 ?\. 2 pass one cut/,
  );
  for (const direction of ["ascending", "descending"]) {
    await head(page, "Radius").click();
    await expect.poll(() => head(page, "Radius").getAttribute("aria-sort")).toBe(direction);
  }
  await waitForStars(page, ["LH-0031", "LH-0052"]);
  await head(page, "Merit").click();
  await waitForStars(page, ["LH-0052", "LH-0031"]);
};

const openStar = async (page: Page): Promise<void> => {
  await page.getByRole("rowheader", { name: "LH-0031" }).click();
  const sheet = page.getByRole("article", { name: "Star LH-0031" });
  await sheet.waitFor();
  const text = await sheet.textContent();
  expect(text).toContain("place 2 of 2");
  await sheet.getByText(/^Extract 1,/).click();
  await sheet.getByText("3141592653589793239").waitFor();
  await press(page, "Close the star");
  await sheet.waitFor({ state: "detached" });
};

const makeList = async (page: Page): Promise<void> => {
  await press(page, "Make a target list");
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Name").fill("First two");
  await dialog.getByLabel("First stars of the table").fill("2");
  await press(page, "Make target list");
  await heading(page, "First two");
  await waitForStars(page, ["LH-0052", "LH-0031"]);
};

const download = async (page: Page, name: string): Promise<string> => {
  const started = page.waitForEvent("download");
  await follow(page, name);
  return contentOf(await started);
};

test("from a file to a ranked list in a file, with the mouse", { timeout: JOURNEY_MS }, async () => {
  const { page, finish } = await openPage({ url: app.url, expected: PREPARING });
  await signIn(page);
  await readFile(page);
  await answerPlan(page);
  await makeInstrument(page);
  await changeMerit(page);
  await lookAtStars(page);
  await cutAndSort(page);
  await openStar(page);
  await makeList(page);
  expectExports(await download(page, "Export CSV"), await download(page, "Export ECSV"));
  await finish();
});
