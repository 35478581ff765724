import { type FormEvent, useState } from "react";
import { useNavigate } from "react-router-dom";
import { type ViewSpec, viewToParams } from "#shared/catalogue/view.ts";
import { count } from "#shared/format/numbers.ts";
import { LIMITS } from "#shared/limits.ts";
import { useMakeList } from "#src/api/lists.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";

interface Props {
  programmeId: string;
  view: ViewSpec;
  /** Stars that pass the cuts. */
  available: number;
  onClose: () => void;
}

const USUAL_SIZE = 150;

/** Makes a target list of the first N stars as the table ranks them. */
export const ListDialog = ({ programmeId, view, available, onClose }: Props) => {
  const navigate = useNavigate();
  const make = useMakeList(programmeId);
  const [name, setName] = useState("");
  const [note, setNote] = useState("");
  const [first, setFirst] = useState(String(Math.min(USUAL_SIZE, available)));
  const size = Number(first);
  const isSize = Number.isInteger(size) && size >= 1 && size <= LIMITS.listStars;
  const sizeError = isSize ? undefined : `Write a whole number from 1 to ${count(LIMITS.listStars)}.`;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (sizeError) return;
    make.mutate(
      { name: name.trim(), note, view: viewToParams(view).toString(), first: size },
      {
        onSuccess: ({ list, note: remark }) => {
          announce(`Made the target list ${list.name} with ${list.stars} stars. ${remark ?? ""}`);
          navigate(`/programmes/${programmeId}/lists/${list.id}`, { state: { remark } });
        },
      },
    );
  };
  return (
    <Dialog title="Make a target list" isOpen onClose={onClose}>
      <form onSubmit={submit} className="flex flex-col gap-4">
        <TextInput
          label="Name"
          required
          value={name}
          maxLength={120}
          onChange={(event) => setName(event.target.value)}
        />
        <TextInput
          label="First stars of the table"
          isNumber
          required
          value={first}
          error={sizeError}
          onChange={(event) => setFirst(event.target.value)}
          hint={`${count(available)} pass the cuts.${size > available ? " The list takes all of them." : ""}`}
        />
        <TextArea
          label="What it is for"
          value={note}
          maxLength={2000}
          onChange={(event) => setNote(event.target.value)}
        />
        <p className="text-xs text-soft">
          The list keeps the values it is made on, whatever becomes of the catalogue.
        </p>
        <ErrorNotice error={make.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" kind="main" isBusy={make.isPending}>
            Make target list
          </Button>
        </div>
      </form>
    </Dialog>
  );
};
