import { z } from "zod";
import { count as countText } from "#shared/format/numbers.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { TextInput } from "#src/ui/inputs.tsx";

interface Props {
  isOpen: boolean;
  count: number;
  onClose: () => void;
  /** The row, from 0. */
  onGo: (row: number) => void;
}

const RowForm = ({ count, onGo }: Pick<Props, "count" | "onGo">) => {
  const says = `Give a whole number from 1 to ${countText(count)}.`;
  const form = useForm({
    schema: z.object({
      row: z
        .string()
        .trim()
        .regex(/^\d+$/, says)
        .transform(Number)
        .pipe(z.number().min(1, says).max(count, says)),
    }),
    initial: { row: "" },
    send: async ({ row }) => onGo(row - 1),
  });
  return (
    <Form form={form} aria-label="Go to a place">
      <TextInput
        isNumber
        autoFocus
        label={`Place, 1 to ${countText(count)}`}
        name="row"
        autoComplete="off"
        value={form.values.row}
        error={form.fields.row}
        onChange={(event) => form.set({ row: event.target.value })}
      />
      <div className="flex justify-end">
        <Button type="submit" kind="main">
          Go to place
        </Button>
      </div>
    </Form>
  );
};

/** Asks for a place in the list and goes there. */
export const RowDialog = ({ isOpen, onClose, ...form }: Props) => (
  <Dialog title="Go to a place" isOpen={isOpen} onClose={onClose}>
    <RowForm {...form} />
  </Dialog>
);
