import { useState } from "react";
import { useNavigate } from "react-router-dom";
import { count } from "#shared/format/numbers.ts";
import { LIMITS } from "#shared/limits.ts";
import { makeExtract, removeExtract, sendCompanion, useKeepExtract } from "#src/api/extracts.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { ErrorNotice } from "#src/ui/error-notice.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { Choice } from "./choice.tsx";
import { FileDrop } from "./file-drop.tsx";
import { pastedRows } from "./pasted.ts";
import { type ReadDraft, useReadDraft, type Way } from "./read-draft.ts";
import { startUpload } from "./uploads.ts";

const WAYS: readonly { value: Way; label: string }[] = [
  { value: "file", label: "A file" },
  { value: "paste", label: "Pasted rows" },
];

/** Makes the extract, sends its description, and lets the file follow while the extract's own page shows it. */
const useBring = () => {
  const programmeId = useProgrammeId();
  const navigate = useNavigate();
  const keep = useKeepExtract(programmeId);
  const [isBusy, setBusy] = useState(false);
  const [error, setError] = useState<unknown>(null);
  const bring = async (file: File, { name, origin, companion }: ReadDraft): Promise<void> => {
    setError(null);
    setBusy(true);
    let made: string | null = null;
    try {
      const extract = await makeExtract(programmeId, {
        name: name.trim(),
        origin: origin.trim(),
        fileName: file.name,
        bytes: file.size,
      });
      made = extract.id;
      keep({ extract, preview: null });
      if (companion) keep(await sendCompanion(programmeId, extract.id, companion));
      startUpload({ programmeId, extractId: made, file, receivedBytes: 0, isNew: true, onDone: keep });
      await navigate(paths.programme.to(programmeId, "extracts", `/${made}`));
    } catch (problem) {
      if (made) await removeExtract(programmeId, made).catch(() => undefined);
      setError(problem);
      setBusy(false);
    }
  };
  return { bring, isBusy, error };
};

const Table = ({ draft }: { draft: ReadDraft }) => {
  if (draft.way === "file")
    return <FileDrop file={draft.file} error={draft.fileError} onFile={draft.choose} />;
  const rows = pastedRows(draft.pasted);
  return (
    <TextArea
      label="Rows"
      name="rows"
      rows={8}
      spellCheck={false}
      wrap="off"
      className="font-mono text-xs"
      hint={`The names of the columns in the first line, then 1 to ${LIMITS.pastedRows} stars; kept as pasted.${rows > 0 ? ` ${count(rows)} rows so far.` : ""}`}
      value={draft.pasted}
      error={draft.fileError}
      onChange={(event) => draft.setPasted(event.target.value)}
    />
  );
};

const Description = ({ draft }: { draft: ReadDraft }) => (
  <details>
    <summary className="min-h-6">The columns are described in a file of their own</summary>
    <p className="mt-1 mb-2 text-xs text-soft">
      A ReadMe with a byte-by-byte description, for example. Both files are kept untouched in one extract.
    </p>
    <FileDrop
      file={draft.companion}
      error={draft.companionError}
      onFile={draft.setCompanion}
      label="Choose description"
      says="or drop it here: text of up to 8 MiB"
    />
  </details>
);

const Reading = ({ onClose }: { onClose: () => void }) => {
  const draft = useReadDraft();
  const { bring, isBusy, error } = useBring();
  const submit = () => {
    const file = draft.ready();
    if (file) void bring(file, draft);
  };
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <ErrorNotice error={error} />
      <div>
        <Choice legend="What is brought" choices={WAYS} value={draft.way} onValue={draft.setWay} />
      </div>
      <Table draft={draft} />
      <TextInput
        label="Name"
        name="name"
        autoComplete="off"
        maxLength={LIMITS.nameCharacters}
        value={draft.name}
        error={draft.nameError}
        onChange={(event) => draft.setName(event.target.value)}
      />
      <TextArea
        label="Origin"
        name="origin"
        hint="Where it comes from: catalogue, query, date, who made it. Kept with the file."
        maxLength={LIMITS.noteCharacters}
        value={draft.origin}
        onChange={(event) => draft.setOrigin(event.target.value)}
      />
      <Description draft={draft} />
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Cancel</Button>
        <Button kind="main" type="submit" isBusy={isBusy}>
          Read file
        </Button>
      </div>
    </form>
  );
};

/** Brings a file or pasted rows as a new extract; nothing of it reaches the catalogue before its plan is confirmed. */
export const ReadFileDialog = ({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) => (
  <Dialog title="Read file" isOpen={isOpen} onClose={onClose}>
    <Reading onClose={onClose} />
  </Dialog>
);
