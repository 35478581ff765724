import { ROLE_LABELS, ROLES, type Role } from "#shared/policy/roles.ts";

/** What a role is for, in a few words. */
const PURPOSES: Record<Role, string> = {
  curator: "brings in extracts and keeps the catalogue clean",
  scientist: "cuts, ranks and makes target lists",
  reviewer: "checks target lists and edits them",
  lead: "agrees on lists; chooses the recipe",
  "instrument-team": "describes instruments; takes lists to the telescope",
  guest: "reads the catalogue and the target lists",
  administrator: "lets people in and gives them roles",
};

interface Props {
  roles: readonly Role[];
  error: string | undefined;
  onChange: (roles: Role[]) => void;
}

/** The roles of one member, as many as they hold. */
export const RoleBoxes = ({ roles, error, onChange }: Props) => (
  <fieldset className="flex flex-col gap-1.5">
    <legend className="mb-1 font-medium">Roles</legend>
    {ROLES.map((role) => (
      <label key={role} className="flex min-h-6 items-start gap-2.5">
        <input
          type="checkbox"
          name="roles"
          className="mt-0.5 size-4 flex-none"
          aria-invalid={error ? true : undefined}
          checked={roles.includes(role)}
          onChange={({ target }) =>
            onChange(ROLES.filter((each) => (each === role ? target.checked : roles.includes(each))))
          }
        />
        <span>
          {ROLE_LABELS[role]} <span className="text-[13px] text-soft">{PURPOSES[role]}</span>
        </span>
      </label>
    ))}
    {error ? (
      <p className="text-xs text-mark">
        <span aria-hidden="true">◆ </span>
        {error}
      </p>
    ) : null}
  </fieldset>
);
