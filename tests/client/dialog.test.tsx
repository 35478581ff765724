import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, expect, test, vi } from "vitest";
import { Dialog } from "#src/ui/dialog.tsx";

afterEach(cleanup);

test("a dialog closes by Esc, not because a file chooser in it was left without a file", () => {
  HTMLDialogElement.prototype.showModal ??= () => undefined;
  const onClose = vi.fn();
  render(
    <Dialog title="Read file" isOpen onClose={onClose}>
      <input type="file" aria-label="File" />
    </Dialog>,
  );
  const cancel = () => new Event("cancel", { bubbles: true, cancelable: true });
  fireEvent(screen.getByLabelText("File"), cancel());
  expect(onClose).not.toHaveBeenCalled();
  fireEvent(screen.getByRole("dialog", { hidden: true }), cancel());
  expect(onClose).toHaveBeenCalledOnce();
});
