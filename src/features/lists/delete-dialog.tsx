import type { TargetList } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

interface Props {
  list: TargetList;
  error: unknown;
  isBusy: boolean;
  onClose: () => void;
  onDelete: () => void;
}

/** Asks before a draft is deleted, as nothing brings it back. */
export const DeleteDialog = ({ list, error, isBusy, onClose, onDelete }: Props) => (
  <Dialog
    title={`Delete the draft ${list.name}?`}
    isOpen
    onClose={onClose}
    footer={
      <>
        <Button onClick={onClose}>Keep draft</Button>
        <Button kind="danger" isBusy={isBusy} onClick={onDelete}>
          Delete draft
        </Button>
      </>
    }
  >
    <p>
      Its {count(list.stars)} {list.stars === 1 ? "star" : "stars"} and the reasons given for them go with it.
      The catalogue stays as it is, and the logbook keeps that the list was there.
    </p>
    <div className="mt-3">
      <ErrorNotice error={error} />
    </div>
  </Dialog>
);
