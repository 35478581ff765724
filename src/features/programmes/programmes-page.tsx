import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { programmesOptions } from "#src/api/programmes.ts";
import { useSession } from "#src/api/session.ts";
import { Button } from "#src/ui/button.tsx";
import { EmptyState } from "#src/ui/empty-state.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { Loading } from "#src/ui/loading.tsx";
import { Page } from "#src/ui/page.tsx";
import { CreateProgramme } from "./create-programme.tsx";
import { ProgrammeEntry } from "./programme-entry.tsx";

const Programmes = () => {
  const { person, programmes: own } = useSession();
  const programmes = useQuery(programmesOptions);
  if (programmes.isPending) return <Loading />;
  if (programmes.isError)
    return <ErrorNotice error={programmes.error} onRetry={() => void programmes.refetch()} />;
  if (programmes.data.length === 0)
    return (
      <EmptyState title="You are in no programme yet.">
        An administrator of a programme can invite you; the address to give them is{" "}
        <span className="font-medium text-ink">{person?.email}</span>.
      </EmptyState>
    );
  return (
    <ul className="border-b border-rule">
      {programmes.data.map((programme) => (
        <ProgrammeEntry
          key={programme.id}
          programme={programme}
          roles={own.find(({ id }) => id === programme.id)?.roles ?? []}
        />
      ))}
    </ul>
  );
};

/** The programmes one is a member of, and the way to a new one for who runs the installation. */
export const ProgrammesPage = () => {
  const { person } = useSession();
  const [isCreating, setCreating] = useState(false);
  return (
    <Page
      title="Programmes"
      lede="A programme is everything one team sees: its extracts, catalogue, instruments and target lists."
      actions={
        person?.isInstallationAdministrator ? (
          <Button kind="main" onClick={() => setCreating(true)}>
            Make programme
          </Button>
        ) : null
      }
    >
      <Programmes />
      <CreateProgramme isOpen={isCreating} onClose={() => setCreating(false)} />
    </Page>
  );
};
