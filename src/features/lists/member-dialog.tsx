import { useQueryClient } from "@tanstack/react-query";
import { Link } from "react-router-dom";
import { type ListMember, MEMBER_STATES, memberPatchBody, type TargetList } from "#shared/api/lists.ts";
import { ApiError } from "#src/api/client.ts";
import { listOptions, useSetMember } from "#src/api/lists.ts";
import { paths } from "#src/app/paths.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextArea } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { isOpenToChange, MEMBER_LABELS, MEMBER_MARKS } from "./list-words.ts";

interface Props {
  programmeId: string;
  list: TargetList;
  member: ListMember;
  mayEdit: boolean;
  onClose: () => void;
}

const MEANS: Readonly<Record<ListMember["state"], string>> = {
  in: "observe it",
  reserve: "if there is time",
  held: "a question is open",
  out: "not observed; needs a reason",
};

const StateForm = ({ programmeId, list, member, onClose }: Props) => {
  const client = useQueryClient();
  const setMember = useSetMember(programmeId, list.id);
  const form = useForm({
    schema: memberPatchBody,
    initial: { state: member.state, reason: member.reason, version: list.version },
    send: async (body) => {
      await setMember.mutateAsync({ starId: member.id, ...body });
      announce(`${member.designation} is ${MEMBER_LABELS[body.state].toLowerCase()}.`);
      onClose();
    },
  });
  const isOvertaken = form.problem instanceof ApiError && form.problem.code === "changed-meanwhile";
  const readAgain = async () => {
    const now = await client.fetchQuery({ ...listOptions(programmeId, list.id), staleTime: 0 });
    form.set({ version: now.version });
    form.forget();
  };
  return (
    <Form form={form} aria-label={`State of ${member.designation}`}>
      {isOvertaken ? (
        <div className="flex flex-wrap gap-2">
          <Button onClick={onClose}>Look at the list first</Button>
          <Button onClick={() => void readAgain()}>Make my change all the same</Button>
        </div>
      ) : null}
      <fieldset>
        <legend className="mb-1 font-medium">State in the list</legend>
        <div className="grid gap-1 sm:grid-cols-2">
          {MEMBER_STATES.map((state) => (
            <label key={state} className="flex min-h-7 items-center gap-2">
              <input
                type="radio"
                name="state"
                checked={form.values.state === state}
                onChange={() => form.set({ state })}
              />
              <span>
                <span aria-hidden="true">{MEMBER_MARKS[state]}</span> {MEMBER_LABELS[state]}
                <span className="text-xs text-soft"> {MEANS[state]}</span>
              </span>
            </label>
          ))}
        </div>
      </fieldset>
      <TextArea
        label="Reason"
        name="reason"
        hint={form.values.state === "out" ? "At least 10 characters; it stays with the star." : undefined}
        value={form.values.reason}
        error={form.fields.reason}
        onChange={(event) => form.set({ reason: event.target.value })}
      />
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Leave as it is</Button>
        <Button type="submit" kind="main" isBusy={form.isBusy} disabled={isOvertaken}>
          {form.values.state === "out" ? "Exclude star" : "Save state"}
        </Button>
      </div>
    </Form>
  );
};

const sheetAddress = ({ programmeId, list, member }: Props): string => {
  const params = new URLSearchParams(list.viewParams);
  params.set("star", member.id);
  return paths.programme.to(programmeId, "catalogue", `?${params}`);
};

/** One star of a list: how it came in, its state and why, and the way to everything about it. */
export const MemberDialog = (props: Props) => {
  const { list, member, mayEdit, onClose } = props;
  return (
    <Dialog title={<span className="font-mono">{member.designation}</span>} isOpen onClose={onClose}>
      <p className="text-soft">
        Came in: {member.cameIn}.{" "}
        <Link
          to={sheetAddress(props)}
          className="whitespace-nowrap underline decoration-edge underline-offset-4 hover:text-ink"
        >
          Open the star in the catalogue
        </Link>
      </p>
      <div className="mt-4">
        {mayEdit && isOpenToChange(list) ? (
          <StateForm {...props} />
        ) : (
          <p>
            <span aria-hidden="true">{MEMBER_MARKS[member.state]}</span> {MEMBER_LABELS[member.state]}
            {member.reason ? `: ${member.reason}` : ""}
            <span className="mt-2 block text-xs text-soft">
              {isOpenToChange(list)
                ? "Changing it needs the Scientist, Reviewer or Lead role."
                : "The list is closed; its stars do not change any more."}
            </span>
          </p>
        )}
      </div>
    </Dialog>
  );
};
