import { useState } from "react";
import type { ListMember, TargetList } from "#shared/api/lists.ts";
import { count } from "#shared/format/numbers.ts";
import { membersKey, readListMembers } from "#src/api/lists.ts";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { GoToRowDialog } from "#src/ui/grid/go-to-row-dialog.tsx";
import { Grid } from "#src/ui/grid/grid.tsx";
import { useBlocks } from "#src/ui/grid/use-blocks.ts";
import { byStateWords } from "./list-words.ts";
import { memberColumns } from "./member-columns.tsx";

const ROW_HEIGHT = 28;

interface Props {
  programmeId: string;
  list: TargetList;
  openId: string | null;
  onOpen: (member: ListMember) => void;
}

/** The stars of the list in order of place, read as they come into view. */
export const MembersCard = ({ programmeId, list, openId, onOpen }: Props) => {
  const [columns] = useState(() => memberColumns(list));
  const [isGoingTo, setGoingTo] = useState(false);
  const [goTo, setGoTo] = useState<{ row: number } | null>(null);
  const blocks = useBlocks<ListMember>({
    // The version moves with each change of a star, so that its row is read again.
    queryKey: [...membersKey(programmeId, list.id), list.version],
    count: list.stars,
    read: (offset, limit, signal) => readListMembers(programmeId, list.id, offset, limit, signal),
  });
  return (
    <section
      aria-label="Stars of the list"
      className="flex h-[70dvh] min-h-80 flex-col overflow-hidden rounded border border-rule 2xl:h-auto"
    >
      <div className="bg-sheet px-4 pt-3 pb-2">
        <h2 className="text-[21px]">
          {count(list.stars)} {list.stars === 1 ? "star" : "stars"}
        </h2>
        <p className="text-xs text-soft">{byStateWords(list)}; in the order they were ranked</p>
      </div>
      {blocks.error ? (
        <div className="p-4">
          <ErrorNotice error={blocks.error} />
        </div>
      ) : null}
      <Grid
        label={`${count(list.stars)} stars of ${list.name}, in order of place`}
        columns={columns}
        count={list.stars}
        rowAt={blocks.rowAt}
        rowKey={(row) => row.id}
        rowLabel={(row) => `${row.designation}, ${row.state}`}
        rowHeight={ROW_HEIGHT}
        sort={null}
        onSort={() => undefined}
        onOpen={onOpen}
        openKey={openId}
        onRange={blocks.onRange}
        goTo={goTo}
        onGoToRow={() => setGoingTo(true)}
        isBusy={blocks.isReading}
      />
      {isGoingTo ? (
        <GoToRowDialog
          rows={list.stars}
          word="place"
          onGo={(row) => {
            setGoTo({ row });
            setGoingTo(false);
          }}
          onClose={() => setGoingTo(false)}
        />
      ) : null}
    </section>
  );
};
