import { useSyncExternalStore } from "react";
import { useNavigate } from "react-router-dom";
import { type Session, THEMES } from "#shared/api/session.ts";
import { can } from "#shared/policy/rights.ts";
import { useChangeMe, useSession, useSignOut } from "#src/api/session.ts";
import { Menu, MenuItem, MenuLabel, MenuLine } from "#src/ui/menu.tsx";
import { paths } from "./paths.ts";
import { currentTheme, showTheme, subscribeToTheme, THEME_LABELS } from "./theme.ts";

const initials = (name: string): string =>
  name
    .split(/\s+/)
    .slice(0, 2)
    .map((word) => word.charAt(0).toUpperCase())
    .join("");

interface Props {
  programme: Session["programmes"][number] | undefined;
  onHelp: () => void;
}

/** The person's own menu: logbook and settings of the programme, other programmes, theme, signing out. */
export const PersonMenu = ({ programme, onHelp }: Props) => {
  const { person, programmes, installation } = useSession();
  const navigate = useNavigate();
  const signOut = useSignOut();
  const change = useChangeMe();
  const theme = useSyncExternalStore(subscribeToTheme, currentTheme);
  const others = programmes.filter((p) => p.id !== programme?.id);
  return (
    <Menu
      // What is seen comes first, so that speaking it finds the button.
      label={`${programme ? `${programme.name} ` : ""}${initials(person?.name ?? "")}, ${person?.name ?? ""}`}
      trigger={
        <span className="flex items-center gap-3">
          {programme ? (
            <span className="hidden max-w-40 truncate text-soft sm:inline">{programme.name}</span>
          ) : null}{" "}
          <span className="grid size-7 place-items-center rounded-full bg-blue text-[11px] text-paper">
            {initials(person?.name ?? "")}
          </span>
        </span>
      }
    >
      <MenuLabel>{person?.name}</MenuLabel>
      {programme && can(programme, "logbook.read") ? (
        <MenuItem onSelect={() => navigate(paths.programme.to(programme.id, "logbook"))}>Logbook</MenuItem>
      ) : null}
      {programme && can(programme, "member.read") ? (
        <MenuItem onSelect={() => navigate(paths.programme.to(programme.id, "settings"))}>
          Programme settings
        </MenuItem>
      ) : null}
      {others.map((p) => (
        <MenuItem key={p.id} onSelect={() => navigate(paths.programme.to(p.id))}>
          {`Go to ${p.name}`}
        </MenuItem>
      ))}
      <MenuItem onSelect={() => navigate(paths.programmes.to())}>All programmes</MenuItem>
      <MenuLine />
      <MenuLabel>Theme</MenuLabel>
      {THEMES.map((option) => (
        <MenuItem
          key={option}
          isChecked={option === theme}
          onSelect={() => {
            showTheme(option);
            change.mutate({ theme: option });
          }}
        >
          {THEME_LABELS[option]}
        </MenuItem>
      ))}
      <MenuLine />
      <MenuItem onSelect={onHelp}>Keys and conventions</MenuItem>
      {installation.hasMailbox && person?.isInstallationAdministrator ? (
        <MenuItem onSelect={() => navigate(paths.mailbox.to())}>Local mailbox</MenuItem>
      ) : null}
      <MenuItem onSelect={() => navigate(paths.me.to())}>My account</MenuItem>
      <MenuItem onSelect={() => signOut.mutate()}>Sign out</MenuItem>
    </Menu>
  );
};
