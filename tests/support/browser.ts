import { mkdirSync } from "node:fs";
import { join } from "node:path";
import { type Browser, type BrowserContext, chromium, type Page } from "playwright-core";
import { afterAll, beforeAll, expect, onTestFailed } from "vitest";
import { findChromium } from "#scripts/lib/debian.ts";
import { ROOT } from "#scripts/lib/root.ts";
import type { OpenSession } from "./sign-in.ts";

let browser: Browser | undefined;

/** One browser for the file, started before its tests and always closed: an open one would keep the run alive. */
export const useBrowser = (): void => {
  beforeAll(async () => {
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
  if (!browser) throw new Error("Call useBrowser() at the top of the test file.");
  const viewport = { width: options.width ?? 1440, height: options.height ?? 900 };
  const context = await browser.newContext({ viewport, baseURL: options.url });
  if (options.session) {
    const { name, value } = options.session.cookie;
    await context.addCookies([{ name, value, url: options.url, httpOnly: true, sameSite: "Lax" }]);
  }
  const page = await context.newPage();
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
