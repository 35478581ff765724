import type { Page } from "playwright-core";
import { beforeAll, describe, expect, test } from "vitest";
import { openPage, withBrowser } from "#tests/support/browser.ts";
import { buildFurnished, type Furnished } from "#tests/support/furnished.ts";
import { gridRows, PREPARING } from "#tests/support/journey.ts";
import { type LiveApp, startLiveApp } from "#tests/support/live-app.ts";
import { openScreen, SCREENS, SIGN_IN, settle } from "#tests/support/screens.ts";

withBrowser();
let app: LiveApp;
let furnished: Furnished;
beforeAll(async () => {
  app = await startLiveApp();
  furnished = await buildFurnished(app);
});

const GRID = '[role="gridcell"]';

/** The rows once none of them is still being read: a placeholder is neither one answer nor another. */
const readRows = async (page: Page) => {
  await expect.poll(async () => (await gridRows(page)).map((row) => row.Star)).not.toContain("loading");
  return gridRows(page);
};

describe("the address of the catalogue", () => {
  test("brings the same stars in the same order after a reload and in another browser", async () => {
    const path = `/programmes/${furnished.programme.id}/catalogue?${furnished.view}&cut=drop~cool~teff+%3C+5500`;
    const first = await openPage({ url: app.url, session: furnished.session, expected: PREPARING });
    await openScreen(first.page, { name: "catalogue", path, ready: GRID });
    await first.page.getByRole("columnheader", { name: "Teff" }).click();
    await first.page.waitForURL(/sort=teff/);
    await settle(first.page, GRID);
    const shown = async ({ page }: typeof first) => ({
      lede: await page.getByRole("heading", { level: 1 }).textContent(),
      stars: (await readRows(page)).map((row) => row.Star),
    });
    const before = await shown(first);
    expect(before.stars.length).toBeGreaterThan(2);
    await first.page.reload();
    await settle(first.page, GRID);
    expect(await shown(first)).toEqual(before);
    const colleague = await app.asPerson("scientist", furnished.programme);
    const second = await openPage({ url: app.url, session: colleague.session, expected: PREPARING });
    await second.page.goto(first.page.url());
    await settle(second.page, GRID);
    expect(await shown(second)).toEqual(before);
    await first.finish();
    await second.finish();
  });

  test("lets Back undo a cut", async () => {
    const path = `/programmes/${furnished.programme.id}/catalogue?${furnished.view}`;
    const { page, finish } = await openPage({
      url: app.url,
      session: furnished.session,
      expected: PREPARING,
    });
    await openScreen(page, { name: "catalogue", path, ready: GRID });
    const before = await readRows(page);
    await page.getByRole("button", { name: "Add a cut" }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByLabel("To, not itself").fill("3600");
    await dialog.getByRole("button", { name: "Add the cut" }).click();
    await expect.poll(async () => (await gridRows(page)).length).toBeLessThan(before.length);
    await page.goBack();
    await expect.poll(() => gridRows(page)).toEqual(before);
    expect(await page.getByText("No cuts:").count()).toBe(1);
    await finish();
  });
});

describe("the workings of a number", () => {
  const open = async (size: { width: number; height: number }) => {
    const opened = await openPage({
      url: app.url,
      session: furnished.session,
      expected: PREPARING,
      ...size,
    });
    const path = `/programmes/${furnished.programme.id}/catalogue?${furnished.view}&columns=designation,radius,r_min`;
    await openScreen(opened.page, { name: "catalogue", path, ready: GRID });
    return opened;
  };
  const focused = (page: Page) => page.evaluate(() => document.activeElement?.textContent ?? "");

  test("open from a cell by M, stand in the address, and Esc leads back step by step", async () => {
    const { page, finish } = await open({ width: 1280, height: 900 });
    await page.locator('[data-row="0"]').last().focus();
    const cell = await focused(page);
    await page.keyboard.press("m");
    const panel = page.getByRole("article", { name: /^Workings of R min/ });
    await panel.waitFor();
    expect(await focused(page)).toBe("R min");
    expect(new URL(page.url()).searchParams.get("workings")).toBe("r_min");
    await panel.getByRole("button", { name: "workings of the radius of the star" }).click();
    await page.getByRole("article", { name: /^Workings of Radius/ }).waitFor();
    expect(new URL(page.url()).searchParams.get("workings")).toBe("r_min,radius");
    await page.keyboard.press("Escape");
    await panel.waitFor();
    await expect.poll(() => focused(page)).toContain("workings of the radius of the star");
    await page.keyboard.press("Escape");
    await page.getByRole("article", { name: /^Star / }).waitFor();
    await expect.poll(() => focused(page)).toBe(cell);
    await finish();
  });

  test("lie beside the table, never over it, at any width from 1024 px on", async () => {
    const { page, finish } = await open({ width: 1024, height: 800 });
    await page.locator('[data-row="0"]').first().click();
    await page.getByRole("article", { name: /^Star / }).waitFor();
    for (const width of [1024, 1150, 1279, 1280]) {
      await page.setViewportSize({ width, height: 800 });
      const [table, sheet] = await Promise.all(
        ["Catalogue", "Star"].map((name) => page.getByLabel(name, { exact: true }).first().boundingBox()),
      );
      expect(table && sheet && table.x + table.width <= sheet.x + 0.5, `${width} px`).toBe(true);
      expect(table?.width ?? 0, `${width} px`).toBeGreaterThan(500);
    }
    await finish();
  });
});

test("no screen scrolls sideways in a window of 320 px", async () => {
  const size = { url: app.url, width: 320, height: 640 };
  const visitor = await openPage(size);
  const member = await openPage({ ...size, session: furnished.session, expected: PREPARING });
  const wide: string[] = [];
  for (const [{ page }, screen] of [
    [visitor, SIGN_IN] as const,
    ...SCREENS.map((screen) => [member, { ...screen, path: screen.path(furnished) }] as const),
  ]) {
    await openScreen(page, screen);
    const sizes = await page.evaluate(() => {
      const content = document.getElementById("content");
      return [
        ["the page", document.scrollingElement?.scrollWidth ?? 0, window.innerWidth] as const,
        ["its content", content?.scrollWidth ?? 0, content?.clientWidth ?? 0] as const,
      ];
    });
    for (const [what, scroll, room] of sizes)
      if (scroll > room) wide.push(`${screen.name}: ${what} is ${scroll} px wide in ${room} px`);
  }
  expect(wide).toEqual([]);
  await visitor.finish();
  await member.finish();
});
