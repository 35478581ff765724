import type { Locator, Page } from "playwright-core";

/** More stops than any screen has. */
const MOST_STOPS = 150;

const hasFocus = (target: Locator): Promise<boolean> =>
  target.evaluate((element) => element === document.activeElement);

/** Presses Tab until the control has the focus, as a person without a mouse would. */
export const tabTo = async (page: Page, target: Locator): Promise<void> => {
  await target.waitFor();
  for (let stops = 0; stops < MOST_STOPS; stops++) {
    if (await hasFocus(target)) return;
    await page.keyboard.press("Tab");
  }
  throw new Error(`The Tab key does not lead to ${target}.`);
};

/** Goes to a button or link and presses Enter. */
export const enterOn = async (page: Page, target: Locator): Promise<void> => {
  await tabTo(page, target);
  await page.keyboard.press("Enter");
};

/** Goes to a text box and types in place of what it holds. */
export const typeInto = async (page: Page, target: Locator, text: string): Promise<void> => {
  await tabTo(page, target);
  await page.keyboard.press("Control+A");
  await page.keyboard.type(text);
};

/** Goes to a drop-down list and steps through it from its top until the option is chosen. */
export const choose = async (page: Page, target: Locator, value: string): Promise<void> => {
  await tabTo(page, target);
  await page.keyboard.press("Home");
  for (let steps = 0; steps < MOST_STOPS; steps++) {
    if ((await target.inputValue()) === value) return;
    await page.keyboard.press("ArrowDown");
  }
  throw new Error(`The arrow keys do not lead to ${value} in ${target}.`);
};
