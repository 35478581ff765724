import { useSyncExternalStore } from "react";
import { THEMES } from "#shared/api/session.ts";
import { useChangeMe } from "#src/api/session.ts";
import { currentTheme, showTheme, subscribeToTheme, THEME_LABELS } from "#src/app/theme.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

/** Shown at once and kept with the account, so that it is there on the next computer. */
export const ThemeChoice = () => {
  const change = useChangeMe();
  const theme = useSyncExternalStore(subscribeToTheme, currentTheme);
  return (
    <fieldset className="flex flex-col gap-1.5">
      <legend className="sr-only">Theme</legend>
      {THEMES.map((option) => (
        <label key={option} className="flex min-h-7 items-center gap-2.5">
          <input
            type="radio"
            name="theme"
            className="size-4"
            checked={option === theme}
            onChange={() => {
              showTheme(option);
              change.mutate({ theme: option });
            }}
          />
          {THEME_LABELS[option]}
        </label>
      ))}
      <ErrorNotice error={change.error} />
    </fieldset>
  );
};
