import { mkdirSync } from "node:fs";
import { join } from "node:path";
import { type Browser, type BrowserContext, chromium, type Page } from "playwright-core";
import { afterAll, beforeAll, expect, onTestFailed } from "vitest";
import { buildClient } from "#scripts/lib/build.ts";
import { findChromium } from "#scripts/lib/debian.ts";
import { ROOT } from "#scripts/lib/root.ts";
import type { Theme } from "#shared/api/session.ts";
import type { OpenSession } from "./sign-in.ts";

/** A machine may be busy with much else; nothing here measures how long anything takes. */
export const PATIENCE_MS = 90_000;

let browser: Browser | undefined;

/**
 * One browser for the file, started before its tests and always closed: an open one would keep the run alive. The pages
 * are built when their sources have changed, so that a file started alone tests what stands in the folder.
 */
export const withBrowser = (): void => {
  beforeAll(async () => {
    await buildClient();
    const executablePath = findChromium();
    if (!executablePath) throw new Error("Chromium is not installed; `npm test` installs it.");
    browser = await chromium.launch({
      executablePath,
      args: ["--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking"],
    });
  });
  afterAll(async () => {
    await browser?.close();
    browser = undefined;
  });
};

export interface OpenPage {
  page: Page;
  context: BrowserContext;
  /** What the console called an error, and every exception that nothing caught. */
  errors: string[];
  /** Fails when there were any; closes the page. */
  finish(): Promise<void>;
}

interface PageOptions {
  /** Where the application listens. */
  url: string;
  session?: OpenSession;
  width?: number;
  height?: number;
  /** As chosen on this computer earlier. */
  theme?: Theme;
  /** Messages a test provokes on purpose. */
  expected?: RegExp;
}

const pictureOf = async (page: Page, name: string): Promise<void> => {
  const folder = join(ROOT, "var/test-pictures");
  mkdirSync(folder, { recursive: true });
  const file = join(folder, `${name.replace(/[^a-z0-9]+/gi, "-").slice(0, 80)}.png`);
  await page.screenshot({ path: file, fullPage: true }).catch(() => undefined);
  console.log(`A picture of the page as the test left it: ${file}`);
};

/** A page in a context of its own. A failed test leaves a picture in `var/test-pictures`. */
export const openPage = async (options: PageOptions): Promise<OpenPage> => {
  if (!browser) throw new Error("Call withBrowser() at the top of the test file.");
  const viewport = { width: options.width ?? 1440, height: options.height ?? 900 };
  const context = await browser.newContext({ viewport, baseURL: options.url, reducedMotion: "reduce" });
  context.setDefaultTimeout(PATIENCE_MS);
  if (options.session) {
    const { name, value } = options.session.cookie;
    await context.addCookies([{ name, value, url: options.url, httpOnly: true, sameSite: "Lax" }]);
  }
  if (options.theme)
    await context.addInitScript((theme) => localStorage.setItem("shortlight.theme", theme), options.theme);
  const page = await context.newPage();
  // The first listener makes the browser hand choosers over, which takes it a moment: long before a key opens one.
  page.on("filechooser", () => undefined);
  const errors: string[] = [];
  const note = (text: string): void => {
    if (!options.expected?.test(text)) errors.push(text);
  };
  page.on("pageerror", (error) => note(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") note(message.text());
  });
  onTestFailed(async ({ task }) => {
    await pictureOf(page, task.name);
    await context.close();
  });
  const finish = async (): Promise<void> => {
    expect(errors).toEqual([]);
    await context.close();
  };
  return { page, context, errors, finish };
};
