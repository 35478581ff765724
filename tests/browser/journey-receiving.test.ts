import type { Page } from "playwright-core";
import { beforeAll, describe, expect, test } from "vitest";
import type { Programme } from "#server/database/entities/programme.entity.ts";
import { LIMITS } from "#shared/limits.ts";
import { openPage, withBrowser } from "#tests/support/browser.ts";
import { buildProgramme } from "#tests/support/factories.ts";
import { rowSum } from "#tests/support/journey.ts";
import { type LiveApp, startLiveApp } from "#tests/support/live-app.ts";
import type { OpenSession } from "#tests/support/sign-in.ts";

withBrowser();
let app: LiveApp;
let programme: Programme;
let session: OpenSession;
beforeAll(async () => {
  app = await startLiveApp();
  programme = await buildProgramme(app.deps.db, { recipe: "practice" });
  ({ session } = await app.asPerson("curator", programme));
});

/** Provoked on purpose: the connection that is cut, and the refusal of the same bytes. */
const CUT = /net::ERR_FAILED|status of 409/;

const HEAD = "source_id,ra,dec,epoch,parallax,note\n";
/** Of one and a quarter pieces; every row another star. */
const bigTable = (): Buffer => {
  const filler = "x".repeat(20_000);
  const rows = Math.ceil((1.25 * LIMITS.pieceBytes) / (filler.length + 40));
  return Buffer.from(
    HEAD +
      Array.from(
        { length: rows },
        (_, i) => `${i + 1},${(i * 0.3) % 360},${(i % 80) - 40},2016,20,${filler}\n`,
      ).join(""),
  );
};
const BIG = { name: "big.csv", mimeType: "text/csv", buffer: bigTable() };

const chooseFile = async (page: Page, file: typeof BIG, within = page.locator("body")): Promise<void> => {
  const chooser = page.waitForEvent("filechooser");
  await within.getByText("Choose file").click();
  await (await chooser).setFiles(file);
};

const openReading = async (page: Page) => {
  await page.goto(`/programmes/${programme.id}/extracts`);
  await page.getByRole("button", { name: "Read file" }).first().click();
  return page.getByRole("dialog");
};

const isPlanOpen = (page: Page): Promise<void> =>
  page.getByRole("heading", { name: "How should this file be read?" }).waitFor();

describe("a file that does not arrive in one go", () => {
  test("goes on from where it stopped, in a window opened later", async () => {
    const first = await openPage({ url: app.url, session, expected: CUT });
    const dialog = await openReading(first.page);
    await chooseFile(first.page, BIG, dialog);
    await first.page.route(`**/original?offset=${LIMITS.pieceBytes}`, (route) => route.abort("failed"));
    await dialog.getByRole("button", { name: "Read file" }).click();
    await first.page.getByText("The server cannot be reached just now").waitFor();
    const address = first.page.url();
    await first.finish();

    const second = await openPage({ url: app.url, session, expected: CUT });
    await second.page.goto(address);
    await second.page.getByRole("heading", { name: /^(79|80) % of the file is here/ }).waitFor();
    const offsets: number[] = [];
    second.page.on("request", (request) => {
      const { searchParams, pathname } = new URL(request.url());
      if (pathname.endsWith("/original")) offsets.push(Number(searchParams.get("offset")));
    });
    await chooseFile(second.page, BIG);
    await second.page.getByRole("button", { name: "Go on sending" }).click();
    await isPlanOpen(second.page);
    expect(offsets).toEqual([0, LIMITS.pieceBytes]);
    await second.finish();
  });

  test("that is here already leads to the extract that has it", async () => {
    const { page, finish } = await openPage({ url: app.url, session, expected: CUT });
    const dialog = await openReading(page);
    await chooseFile(page, BIG, dialog);
    await dialog.getByRole("button", { name: "Read file" }).click();
    await page.getByText(/This file is already here: extract 1/).waitFor();
    await page.getByRole("link", { name: "Open extract 1" }).click();
    await isPlanOpen(page);
    await page.goto(`/programmes/${programme.id}/extracts`);
    await page.getByRole("link", { name: "big" }).waitFor();
    expect(await page.getByRole("link", { name: "big" }).count()).toBe(1);
    await finish();
  });
});

test("rows that are pasted, with a description beside them, go the whole way", async () => {
  const { page, finish } = await openPage({ url: app.url, session, expected: CUT });
  const dialog = await openReading(page);
  await dialog.getByRole("button", { name: "Pasted rows" }).click();
  await dialog.getByRole("button", { name: "Read file" }).click();
  await dialog.getByText("Paste the rows first").waitFor();
  await dialog
    .getByLabel("Rows")
    .fill("source_id\tra\tdec\tepoch\tparallax\n11\t110.5\t20\t2016\t30\n12\t211.5\t21\t2016\t31\n");
  await dialog.getByLabel("Name").fill("From a paper");
  await dialog.getByText("The columns are described in a file of their own").click();
  const chooser = page.waitForEvent("filechooser");
  await dialog.getByText("Choose description").click();
  await (await chooser).setFiles({
    name: "ReadMe",
    mimeType: "text/plain",
    buffer: Buffer.from("Two stars.\n"),
  });
  await dialog.getByRole("button", { name: "Read file" }).click();
  await isPlanOpen(page);
  await page.getByRole("link", { name: "Download the description, ReadMe" }).waitFor();
  await page.getByText("There is no byte-by-byte description").waitFor();
  await page.getByRole("button", { name: "Leave the description out" }).click();
  await page.getByText("Nothing is open.").waitFor();
  await page.getByRole("tab", { name: "Rows" }).click();
  await page.getByRole("tabpanel", { name: "Rows" }).getByRole("cell", { name: "110.5" }).waitFor();
  await page.keyboard.press("ArrowRight");
  await page
    .getByRole("img", { name: /^2 sampled positions drawn/ })
    .last()
    .waitFor();
  expect(page.url()).toContain("look=sky");
  await page.getByRole("button", { name: "Commit extract" }).click();
  await page.getByRole("heading", { name: /These stars are in edition/ }).waitFor();
  expect(await rowSum(page)).toEqual([2, 2, 0, 0]);
  await finish();
});
