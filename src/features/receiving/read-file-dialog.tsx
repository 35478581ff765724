import { useState } from "react";
import { useNavigate } from "react-router-dom";
import { LIMITS } from "#shared/limits.ts";
import { paths } from "#src/app/paths.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { TextArea, TextInput } from "#src/ui/inputs.tsx";
import { Progress } from "#src/ui/progress.tsx";
import { FileDrop, refusalOf } from "./file-drop.tsx";
import { UploadProblem } from "./upload-problem.tsx";
import { useUpload } from "./use-upload.ts";

/** A name to begin with: the file's own without its ending. */
const nameOf = (file: File): string =>
  file.name
    .replace(/\.[a-z0-9]{1,5}$/i, "")
    .replaceAll("_", " ")
    .slice(0, LIMITS.nameCharacters);

const useDraft = () => {
  const [file, setFile] = useState<File | null>(null);
  const [name, setName] = useState("");
  const [origin, setOrigin] = useState("");
  const [isTried, setTried] = useState(false);
  const choose = (chosen: File) => {
    setFile(chosen);
    if (name.trim() === "" || (file && name === nameOf(file))) setName(nameOf(chosen));
  };
  const isTooLarge = file !== null && file.size > LIMITS.fileBytes;
  return {
    file,
    name,
    origin,
    setName,
    setOrigin,
    choose,
    try: () => setTried(true),
    fileError: isTried || isTooLarge ? refusalOf(file) : undefined,
    nameError: isTried && name.trim() === "" ? "Give the extract a name." : undefined,
  };
};

const Sending = ({ onClose }: { onClose: () => void }) => {
  const programmeId = useProgrammeId();
  const navigate = useNavigate();
  const draft = useDraft();
  const { upload, error, send, cancel, forget } = useUpload(programmeId, ({ extract }) =>
    navigate(paths.programme.to(programmeId, "extracts", `/${extract.id}`)),
  );
  const submit = () => {
    draft.try();
    const { file } = draft;
    if (!file || refusalOf(file) || draft.name.trim() === "") return;
    const { name, origin } = draft;
    void send(file, { name: name.trim(), origin: origin.trim(), fileName: file.name, bytes: file.size });
  };
  if (upload)
    return (
      <div className="flex flex-col gap-4">
        <Progress
          label={upload.sent < upload.bytes ? `Sending ${draft.name}` : "Looking at the first rows"}
          done={upload.sent}
          total={upload.bytes}
          unit="bytes"
        />
        <p className="text-soft">Stay on this page until the file has arrived.</p>
        <div className="flex justify-end">
          <Button onClick={cancel}>Stop sending</Button>
        </div>
      </div>
    );
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <UploadProblem error={error} />
      <FileDrop
        file={draft.file}
        error={draft.fileError}
        onFile={(file) => {
          forget();
          draft.choose(file);
        }}
      />
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
      <div className="flex flex-wrap justify-end gap-2">
        <Button onClick={onClose}>Cancel</Button>
        <Button kind="main" type="submit">
          Read file
        </Button>
      </div>
    </form>
  );
};

/** Brings a file as a new extract; nothing of it reaches the catalogue before its plan is confirmed. */
export const ReadFileDialog = ({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) => (
  <Dialog title="Read file" isOpen={isOpen} onClose={onClose}>
    <Sending onClose={onClose} />
  </Dialog>
);
