import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import type { Extract, NamedPlan, ReadingPlan } from "#shared/api/extracts.ts";
import { LIMITS } from "#shared/limits.ts";
import { namedPlansOptions, useSaveNamedPlan } from "#src/api/reading-plans.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { TextInput } from "#src/ui/inputs.tsx";

interface Props {
  plan: ReadingPlan;
  suggestedName: string;
  isOpen: boolean;
  onClose: () => void;
}

const hintFor = (same: NamedPlan | undefined): string =>
  same
    ? `“${same.name}” is there already: this becomes its version ${same.number + 1}. Earlier versions stay.`
    : "It is offered when a file with the same header arrives.";

const Saving = ({ plan, suggestedName, onClose }: Omit<Props, "isOpen">) => {
  const programmeId = useProgrammeId();
  const { data: plans = [] } = useQuery(namedPlansOptions(programmeId));
  const save = useSaveNamedPlan(programmeId);
  const [name, setName] = useState(suggestedName);
  const [isTried, setTried] = useState(false);
  const same = plans.find((p) => p.name.toLowerCase() === name.trim().toLowerCase());
  if (save.data)
    return (
      <>
        <p role="status" className="wrap-anywhere">
          Saved as “{save.data.name}”, version {save.data.number}.
        </p>
        <div className="mt-5 flex justify-end">
          <Button kind="main" onClick={onClose}>
            Back to the plan
          </Button>
        </div>
      </>
    );
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (name.trim() === "") return;
        save.mutate({ ...(same ? { id: same.id, name: same.name } : { name: name.trim() }), plan });
      }}
    >
      <ErrorNotice error={save.error} />
      <TextInput
        label="Name of the plan"
        autoComplete="off"
        maxLength={LIMITS.nameCharacters}
        value={name}
        hint={hintFor(same)}
        error={isTried && name.trim() === "" ? "Give the plan a name." : undefined}
        onChange={(event) => setName(event.target.value)}
      />
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Cancel</Button>
        <Button kind="main" type="submit" isBusy={save.isPending}>
          {same ? `Save as version ${same.number + 1}` : "Save plan"}
        </Button>
      </div>
    </form>
  );
};

/** Gives the plan a name, so that the next file of its kind is read the same way; a known name gets a further version. */
const SavePlanDialog = ({ isOpen, onClose, ...rest }: Props) => (
  <Dialog title="Save the plan under a name" isOpen={isOpen} onClose={onClose}>
    <Saving onClose={onClose} {...rest} />
  </Dialog>
);

/** Opens the dialog; the extract's name is a name to begin with. */
export const SavePlanButton = ({ extract, plan }: { extract: Extract; plan: ReadingPlan }) => {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Save plan under a name</Button>
      <SavePlanDialog
        plan={plan}
        suggestedName={extract.name}
        isOpen={isOpen}
        onClose={() => setOpen(false)}
      />
    </>
  );
};
