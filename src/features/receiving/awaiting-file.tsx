import { useState } from "react";
import type { Extract } from "#shared/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { Progress } from "#src/ui/progress.tsx";
import { sizeOf } from "./extract-words.ts";
import { FileDrop, refusalOf } from "./file-drop.tsx";
import { UploadProblem } from "./upload-problem.tsx";
import { useUpload } from "./use-upload.ts";

const SendAgain = ({ extract }: { extract: Extract }) => {
  const [file, setFile] = useState<File | null>(null);
  const { upload, error, send, cancel } = useUpload(useProgrammeId(), () => undefined);
  const isOther = file !== null && file.size !== extract.bytes;
  const refusal = isOther
    ? `This file has ${sizeOf(file.size)}; ${extract.fileName} was announced with ${sizeOf(extract.bytes)}. Choose that one, or bring this as a new extract.`
    : undefined;
  if (upload)
    return (
      <div className="flex max-w-xl flex-col gap-3">
        <Progress
          label={`Sending ${extract.fileName}`}
          done={upload.sent}
          total={upload.bytes}
          unit="bytes"
        />
        <div>
          <Button onClick={cancel}>Stop sending</Button>
        </div>
      </div>
    );
  return (
    <div className="flex max-w-xl flex-col gap-3">
      <UploadProblem error={error} />
      <FileDrop file={file} error={refusal} onFile={setFile} />
      <div>
        <Button
          kind="main"
          disabled={file === null || isOther || refusalOf(file) !== undefined}
          onClick={() => {
            if (file) void send(file, extract.id);
          }}
        >
          Send file
        </Button>
      </div>
    </div>
  );
};

/** An extract whose file is on its way, or did not arrive. */
export const AwaitingFile = ({ extract }: { extract: Extract }) => {
  const canEdit = useCan()("extract.edit");
  return (
    <>
      <h1 className="mb-2 text-[30px]">The file is not here yet</h1>
      {extract.failure ? (
        <div className="mb-4 max-w-xl rounded border border-mark bg-sheet p-3">
          <p className="font-medium">
            <LevelMark level="stop" /> {extract.failure.message}
          </p>
          <p className="mt-1 text-soft">{extract.failure.hint}</p>
        </div>
      ) : (
        <p className="mb-4 text-soft">
          {extract.fileName}, {sizeOf(extract.bytes)}, was announced by {extract.uploadedBy.name}. If nobody
          is sending it now, send it here.
        </p>
      )}
      {canEdit ? <SendAgain extract={extract} /> : null}
    </>
  );
};
