import { useState } from "react";
import { useNavigate } from "react-router-dom";
import type { Programme } from "#shared/api/programmes.ts";
import { useLeaveProgramme } from "#src/api/programmes.ts";
import { paths } from "#src/app/paths.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

export const LeaveProgramme = ({ programme }: { programme: Programme }) => {
  const [isAsked, setAsked] = useState(false);
  const navigate = useNavigate();
  const leave = useLeaveProgramme(programme.id, () => navigate(paths.programmes.to(), { replace: true }));
  return (
    <>
      <p className="mb-3">You would see nothing of this programme any more.</p>
      <Button kind="danger" onClick={() => setAsked(true)}>
        Leave programme
      </Button>
      <Dialog title={`Leave ${programme.name}`} isOpen={isAsked} onClose={() => setAsked(false)}>
        <p>
          You will see nothing of it any more, until one of its administrators invites you again. What you did
          stays, with your name in the logbook.
        </p>
        <div className="mt-4">
          <ErrorNotice error={leave.error} />
        </div>
        <div className="mt-4 flex flex-wrap justify-end gap-2">
          <Button onClick={() => setAsked(false)}>Stay</Button>
          <Button kind="danger" isBusy={leave.isPending} onClick={() => leave.mutate()}>
            Leave programme
          </Button>
        </div>
      </Dialog>
    </>
  );
};
