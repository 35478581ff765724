import { useState } from "react";
import { useNavigate } from "react-router-dom";
import type { TargetList } from "#shared/api/lists.ts";
import { exportPath, useDeleteList, useMoveList } from "#src/api/lists.ts";
import { paths } from "#src/app/paths.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { DeleteDialog } from "./delete-dialog.tsx";
import { EditDialog } from "./edit-dialog.tsx";
import { isOpenToChange } from "./list-words.ts";

interface Props {
  programmeId: string;
  list: TargetList;
}

const ExportLink = ({ programmeId, list, format }: Props & { format: "csv" | "ecsv" }) => (
  <a
    href={exportPath(programmeId, list.id, format)}
    download
    className="inline-flex min-h-8 items-center rounded border border-edge bg-sheet px-3 py-1 text-[13px] whitespace-nowrap hover:bg-sel"
  >
    Export {format.toUpperCase()}
  </a>
);

const MoveButton = ({ list, move }: { list: TargetList; move: ReturnType<typeof useMoveList> }) => {
  const to = list.state === "draft" ? "in-review" : "draft";
  const says = to === "in-review" ? "The list is in review." : "The list is a draft again.";
  return (
    <Button
      kind={to === "in-review" ? "main" : "quiet"}
      isBusy={move.isPending}
      onClick={() => move.mutate({ state: to, version: list.version }, { onSuccess: () => announce(says) })}
    >
      {to === "in-review" ? "Send to review" : "Take back to draft"}
    </Button>
  );
};

/** What can be done with a list as a whole, as far as the person may and its state allows. */
export const ListActions = ({ programmeId, list }: Props) => {
  const can = useCan();
  const navigate = useNavigate();
  const [asks, setAsks] = useState<"edit" | "delete" | null>(null);
  const move = useMoveList(programmeId, list.id);
  const remove = useDeleteList(programmeId, list.id, () =>
    navigate(paths.programme.to(programmeId, "lists")),
  );
  const close = () => setAsks(null);
  return (
    <div className="flex min-w-0 flex-col gap-2">
      <div className="flex flex-wrap gap-2 sm:justify-end">
        {list.state === "draft" && can("list.make") ? (
          <Button onClick={() => setAsks("delete")}>Delete draft</Button>
        ) : null}
        {isOpenToChange(list) && can("list.edit") ? (
          <Button onClick={() => setAsks("edit")}>Rename list</Button>
        ) : null}
        {can("list.export") ? (
          <>
            <ExportLink programmeId={programmeId} list={list} format="csv" />
            <ExportLink programmeId={programmeId} list={list} format="ecsv" />
          </>
        ) : null}
        {isOpenToChange(list) && can("list.send-to-review") ? <MoveButton list={list} move={move} /> : null}
      </div>
      <ErrorNotice error={move.error} />
      {asks === "edit" ? <EditDialog programmeId={programmeId} list={list} onClose={close} /> : null}
      {asks === "delete" ? (
        <DeleteDialog
          list={list}
          error={remove.error}
          isBusy={remove.isPending}
          onClose={close}
          onDelete={() => remove.mutate()}
        />
      ) : null}
    </div>
  );
};
