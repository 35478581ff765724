import { useNavigate } from "react-router-dom";
import type { Extract } from "#shared/api/extracts.ts";
import { removeExtract } from "#src/api/extracts.ts";
import { useProgrammeChange } from "#src/api/programmes.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { dropUpload } from "./uploads.ts";

interface Props {
  extract: Extract;
  isOpen: boolean;
  onClose: () => void;
}

/** Removes an extract that never was part of the catalogue, with its file. */
export const DeleteDialog = ({ extract, isOpen, onClose }: Props) => {
  const programmeId = useProgrammeId();
  const navigate = useNavigate();
  const remove = useProgrammeChange(programmeId, async (id: string) => {
    dropUpload(id);
    await removeExtract(programmeId, id);
    await navigate(paths.programme.to(programmeId, "extracts"));
  });
  return (
    <Dialog
      title={`Delete extract ${extract.number}`}
      isOpen={isOpen}
      onClose={onClose}
      footer={
        <>
          <Button onClick={onClose}>Keep extract</Button>
          <Button kind="danger" isBusy={remove.isPending} onClick={() => remove.mutate(extract.id)}>
            Delete extract
          </Button>
        </>
      }
    >
      <p className="wrap-anywhere">
        “{extract.name}” and its file {extract.fileName} are removed from here, with the answers given so far.
        The catalogue does not change. The logbook keeps that it was here.
      </p>
      <div className="mt-3">
        <ErrorNotice error={remove.error} />
      </div>
    </Dialog>
  );
};
