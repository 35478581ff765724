import { readFileSync } from "node:fs";
import { join } from "node:path";
import type { AxeResults } from "axe-core";
import type { Page } from "playwright-core";
import { beforeAll, describe, expect, test } from "vitest";
import { ROOT } from "#scripts/lib/root.ts";
import { THEMES, type Theme } from "#shared/api/session.ts";
import { type OpenPage, openPage, withBrowser } from "#tests/support/browser.ts";
import { buildFurnished, type Furnished } from "#tests/support/furnished.ts";
import { type LiveApp, startLiveApp } from "#tests/support/live-app.ts";
import { openScreen, SCREENS, type ScreenAt, SIGN_IN } from "#tests/support/screens.ts";

const AXE = readFileSync(join(ROOT, "node_modules/axe-core/axe.min.js"), "utf8");
/** 5 % of a channel. */
const MOST_OTHER_HUE = 12;

withBrowser();
let app: LiveApp;
let furnished: Furnished;
beforeAll(async () => {
  app = await startLiveApp();
  furnished = await buildFurnished(app);
});

const showTheme = (page: Page, theme: Theme): Promise<void> =>
  page.evaluate((chosen) => {
    document.documentElement.dataset.theme = chosen;
    window.dispatchEvent(new Event("shortlight-theme"));
    return new Promise<void>((painted) =>
      requestAnimationFrame(() => requestAnimationFrame(() => painted())),
    );
  }, theme);

/** What axe finds serious or critical: the rule, what it is about, and the elements. */
const violations = async (page: Page, isColourAlone: boolean): Promise<string[]> => {
  // Evaluated by the debugger, which the content security policy of the page does not bind.
  await page.evaluate(AXE);
  const results = await page.evaluate(async (colour): Promise<AxeResults> => {
    const { axe } = window as unknown as { axe: typeof import("axe-core") };
    return axe.run(document, {
      resultTypes: ["violations"],
      ...(colour ? { runOnly: ["color-contrast", "link-in-text-block"] } : {}),
    });
  }, isColourAlone);
  return results.violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .flatMap(({ id, nodes }) =>
      nodes.map((node) => `${id}: ${node.target.join(" ")}: ${node.failureSummary?.replace(/\s+/g, " ")}`),
    );
};

/** The screen in each theme; themes differ in colours alone, so the other rules need one of them. */
const faultsOf = async (page: Page, screen: ScreenAt): Promise<string[]> => {
  await openScreen(page, screen);
  const faults: string[] = [];
  for (const theme of THEMES) {
    await showTheme(page, theme);
    const found = await violations(page, theme !== "plate");
    faults.push(...found.map((fault) => `${screen.name}, ${theme}: ${fault}`));
  }
  return faults;
};

describe("axe finds nothing serious in any theme", () => {
  test("before signing in", async () => {
    const { page, finish } = await openPage({ url: app.url });
    expect(await faultsOf(page, SIGN_IN)).toEqual([]);
    await finish();
  });

  test.each(SCREENS)("on $name", async (screen) => {
    const { page, finish } = await openPage({ url: app.url, session: furnished.session });
    expect(await faultsOf(page, { ...screen, path: screen.path(furnished) })).toEqual([]);
    await finish();
  });
});

interface Hues {
  green: number;
  blue: number;
  /** Brightest red, so that a black picture does not pass. */
  red: number;
  /** Where the most of another hue is. */
  at: string;
}

/** The most of each channel in a picture, read by the browser itself on an empty page. */
const huesOf = (reader: Page, png: Buffer): Promise<Hues> =>
  reader.evaluate(async (base64) => {
    const blob = await (await fetch(`data:image/png;base64,${base64}`)).blob();
    const picture = await createImageBitmap(blob);
    const context = new OffscreenCanvas(picture.width, picture.height).getContext("2d");
    if (!context) throw new Error("No canvas to read the picture with.");
    context.drawImage(picture, 0, 0);
    const { data, width } = context.getImageData(0, 0, picture.width, picture.height);
    const most = { red: 0, green: 0, blue: 0, at: "" };
    for (let i = 0; i < data.length; i += 4) {
      const [red = 0, green = 0, blue = 0] = [data[i], data[i + 1], data[i + 2]];
      if (Math.max(green, blue) > Math.max(most.green, most.blue))
        most.at = `${(i / 4) % width}, ${Math.floor(i / 4 / width)}`;
      most.red = Math.max(most.red, red);
      most.green = Math.max(most.green, green);
      most.blue = Math.max(most.blue, blue);
    }
    return most;
  }, png.toString("base64"));

const strayHues = async (opened: OpenPage, all: readonly ScreenAt[]): Promise<string[]> => {
  const reader = await opened.context.newPage();
  const faults: string[] = [];
  for (const screen of all) {
    await openScreen(opened.page, screen);
    // With a focus ring on it.
    await opened.page.keyboard.press("Tab");
    await opened.page.keyboard.press("Tab");
    const { red, green, blue, at } = await huesOf(reader, await opened.page.screenshot());
    if (red < 100) faults.push(`${screen.name}: nothing to be seen`);
    if (Math.max(green, blue) > MOST_OTHER_HUE)
      faults.push(`${screen.name}: green ${green}, blue ${blue} at ${at}`);
  }
  return faults;
};

describe("dark-adapted", () => {
  test("holds no pixel of another hue", async () => {
    const visitor = await openPage({ url: app.url, theme: "dark-adapted" });
    expect(await strayHues(visitor, [SIGN_IN])).toEqual([]);
    await visitor.finish();
    const member = await openPage({
      url: app.url,
      session: furnished.session,
      theme: "dark-adapted",
      height: 1800,
    });
    const screens = SCREENS.map((screen) => ({ ...screen, path: screen.path(furnished) }));
    expect(await strayHues(member, screens)).toEqual([]);
    await member.finish();
  });

  test("is there before the first paint, on a system that prefers light", async () => {
    const { page, context, finish } = await openPage({
      url: app.url,
      session: furnished.session,
      theme: "dark-adapted",
    });
    await context.addInitScript(() => {
      const seen: string[] = [];
      (window as unknown as { seen: string[] }).seen = seen;
      const note = (when: string) =>
        seen.push(
          `${when}: ${document.documentElement.dataset.theme}, ${getComputedStyle(document.documentElement).backgroundColor}`,
        );
      new PerformanceObserver(() => note("paint")).observe({ type: "paint", buffered: true });
      document.addEventListener("DOMContentLoaded", () => note("loaded"));
    });
    await page.goto(`/programmes/${furnished.programme.id}/overview`);
    await page.reload();
    await page.waitForFunction(() => (window as unknown as { seen: string[] }).seen.length >= 2);
    const seen = await page.evaluate(() => (window as unknown as { seen: string[] }).seen);
    expect(new Set(seen.map((line) => line.slice(line.indexOf(": ") + 2)))).toEqual(
      new Set(["dark-adapted, rgb(0, 0, 0)"]),
    );
    await finish();
  });
});
