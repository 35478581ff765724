import { Link } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import { count } from "#shared/format/numbers.ts";
import { ROLE_LABELS, type Role } from "#shared/policy/roles.ts";
import { paths } from "#src/app/paths.ts";
import { Pill } from "#src/ui/pill.tsx";

/** One programme: what it holds and what one is in it. */
export const ProgrammeEntry = ({ programme, roles }: { programme: Programme; roles: readonly Role[] }) => (
  <li className="relative grid gap-x-8 gap-y-2 border-t border-rule py-5 hover:bg-sheet sm:grid-cols-[minmax(0,1fr)_auto]">
    <div className="min-w-0">
      <h2 className="text-[22px] wrap-anywhere">
        {/* The whole entry opens it; the name alone is what is read out. */}
        <Link to={paths.programme.to(programme.id)} className="after:absolute after:inset-0">
          {programme.name}
        </Link>
      </h2>
      {programme.description ? (
        <p className="mt-0.5 max-w-2xl text-soft wrap-anywhere">{programme.description}</p>
      ) : null}
      <p className="mt-2 flex flex-wrap gap-1.5">
        {roles.map((role) => (
          <Pill key={role}>{ROLE_LABELS[role]}</Pill>
        ))}
        {programme.isInvented ? <Pill tone="calm">invented sky</Pill> : null}
      </p>
    </div>
    <dl className="flex gap-6 text-right text-[13px]">
      <div>
        <dt className="text-soft">Edition</dt>
        <dd className="font-mono">{programme.edition ?? "none yet"}</dd>
      </div>
      <div>
        <dt className="text-soft">Stars</dt>
        <dd className="font-mono">{count(programme.stars)}</dd>
      </div>
      <div>
        <dt className="text-soft">Members</dt>
        <dd className="font-mono">{count(programme.counts.members)}</dd>
      </div>
    </dl>
  </li>
);
