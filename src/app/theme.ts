import { THEMES, type Theme } from "#shared/api/session.ts";

const KEY = "shortlight.theme";
/** Tells every part that shows the theme. */
const CHANGED = "shortlight-theme";

export const THEME_LABELS: Record<Theme, string> = {
  plate: "Plate (light)",
  dome: "Dome (dark)",
  "dark-adapted": "Dark-adapted (red)",
  amber: "Dim amber",
};

const isTheme = (text: string | undefined): text is Theme =>
  (THEMES as readonly string[]).includes(text ?? "");

export const currentTheme = (): Theme => {
  const theme = document.documentElement.dataset.theme;
  return isTheme(theme) ? theme : "plate";
};

/** Shows the theme and remembers it on this computer, where /theme.js finds it before the next first paint. */
export const showTheme = (theme: Theme): void => {
  document.documentElement.dataset.theme = theme;
  try {
    localStorage.setItem(KEY, theme);
  } catch {
    // Storage may be forbidden; the theme then lasts as long as the page.
  }
  window.dispatchEvent(new Event(CHANGED));
};

export const nextTheme = (): Theme => THEMES[(THEMES.indexOf(currentTheme()) + 1) % THEMES.length] ?? "plate";

export const subscribeToTheme = (notify: () => void): (() => void) => {
  window.addEventListener(CHANGED, notify);
  return () => window.removeEventListener(CHANGED, notify);
};
