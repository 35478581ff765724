import { NavLink } from "react-router-dom";
import type { Session } from "#shared/api/session.ts";
import { type Action, can } from "#shared/policy/rights.ts";
import { paths, type Screen } from "./paths.ts";

const SCREENS: readonly { screen: Screen; label: string; action: Action }[] = [
  { screen: "overview", label: "Overview", action: "programme.read" },
  { screen: "extracts", label: "Extracts", action: "extract.read" },
  { screen: "catalogue", label: "Catalogue", action: "catalogue.read" },
  { screen: "instruments", label: "Instruments", action: "instrument.read" },
  { screen: "merit", label: "Merit", action: "merit.read" },
  { screen: "lists", label: "Target lists", action: "list.read" },
  { screen: "plan", label: "Plan", action: "programme.read" },
];

/** The screens of a programme that the person may open; on narrow windows it scrolls sideways. */
export const Navigation = ({ programme }: { programme: Session["programmes"][number] }) => (
  <nav
    aria-label="Screens of the programme"
    className="order-last min-w-0 basis-full overflow-x-auto xl:order-none xl:basis-auto xl:grow"
  >
    <ul className="flex gap-5">
      {SCREENS.filter(({ action }) => can(programme, action)).map(({ screen, label }) => (
        <li key={screen} className="flex-none">
          <NavLink
            to={paths.programme.to(programme.id, screen)}
            className={({ isActive }) =>
              `block border-b-2 py-3.5 ${isActive ? "border-mark text-ink" : "border-transparent text-soft hover:text-ink"}`
            }
          >
            {label}
          </NavLink>
        </li>
      ))}
    </ul>
  </nav>
);
