import type { Extract } from "#shared/api/extracts.ts";
import { useWithdrawExtract } from "#src/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";

interface Props {
  extract: Extract;
  isOpen: boolean;
  onClose: () => void;
}

/** Confirms that a new edition without the extract is made. */
export const WithdrawDialog = ({ extract, isOpen, onClose }: Props) => {
  const withdraw = useWithdrawExtract(useProgrammeId(), extract.id);
  return (
    <Dialog
      title={`Withdraw extract ${extract.number}`}
      isOpen={isOpen}
      onClose={onClose}
      footer={
        <>
          <Button onClick={onClose}>Keep extract</Button>
          <Button
            kind="danger"
            isBusy={withdraw.isPending}
            onClick={() => withdraw.mutate(undefined, { onSuccess: onClose })}
          >
            Withdraw extract
          </Button>
        </>
      }
    >
      <p className="wrap-anywhere">
        A new catalogue edition is made without what “{extract.name}” gave. Earlier editions, and the original
        file, stay as they are.
      </p>
      <div className="mt-3">
        <ErrorNotice error={withdraw.error} />
      </div>
    </Dialog>
  );
};
