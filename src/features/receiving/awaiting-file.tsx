import { useState } from "react";
import type { Extract } from "#shared/api/extracts.ts";
import { useKeepExtract } from "#src/api/extracts.ts";
import { useProgrammeId } from "#src/lib/programme-path.ts";
import { useCan } from "#src/lib/rights.ts";
import { Button } from "#src/ui/button.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { Progress } from "#src/ui/progress.tsx";
import { shareOf, sizeOf } from "./extract-words.ts";
import { FileDrop, refusalOf } from "./file-drop.tsx";
import { UploadProgress } from "./upload-progress.tsx";
import { startUpload, useUploadOf } from "./uploads.ts";

/** Why that file cannot be the one that was announced; undefined when it can. */
const otherThan = (extract: Extract, file: File | null): string | undefined => {
  if (!file) return undefined;
  if (file.size !== extract.bytes)
    return `This file has ${sizeOf(file.size)}; ${extract.fileName} was announced with ${sizeOf(extract.bytes)}. Choose that one, or bring this as a new extract.`;
  if (extract.receivedBytes > 0 && file.name !== extract.fileName)
    return `This is ${file.name}; what is here is the beginning of ${extract.fileName}. Choose that one, or bring this as a new extract.`;
  return refusalOf(file);
};

const SendAgain = ({ extract }: { extract: Extract }) => {
  const programmeId = useProgrammeId();
  const keep = useKeepExtract(programmeId);
  const [file, setFile] = useState<File | null>(null);
  const refusal = otherThan(extract, file);
  const send = () => {
    if (!file) return;
    const { id: extractId, receivedBytes } = extract;
    startUpload({ programmeId, extractId, file, receivedBytes, isNew: false, onDone: keep });
  };
  return (
    <div className="flex max-w-xl flex-col gap-3">
      <FileDrop file={file} error={refusal} onFile={setFile} />
      <div>
        <Button kind="main" disabled={file === null || refusal !== undefined} onClick={send}>
          {extract.receivedBytes > 0 ? "Go on sending" : "Send file"}
        </Button>
      </div>
    </div>
  );
};

const WhatIsHere = ({ extract }: { extract: Extract }) => (
  <div className="mb-5 flex max-w-xl flex-col gap-3">
    <Progress label="Arrived so far" done={extract.receivedBytes} total={extract.bytes} unit="bytes" />
    <p className="text-soft">
      The beginning of {extract.fileName} ({sizeOf(extract.bytes)}) is kept for a week. If nobody is sending
      the rest now, choose the same file again: only the rest is sent.
    </p>
  </div>
);

const Failure = ({ failure }: { failure: NonNullable<Extract["failure"]> }) => (
  <div className="mb-4 max-w-xl rounded border border-mark bg-sheet p-3">
    <p className="font-medium">
      <LevelMark level="stop" /> {failure.message}
    </p>
    <p className="mt-1 text-soft">{failure.hint}</p>
  </div>
);

const Announced = ({ extract }: { extract: Extract }) => (
  <p className="mb-4 text-soft">
    {extract.fileName}, {sizeOf(extract.bytes)}, was announced by {extract.uploadedBy.name}. If nobody is
    sending it now, send it here.
  </p>
);

const titleOf = (extract: Extract, isSending: boolean): string => {
  if (isSending) return "The file is on its way";
  return extract.receivedBytes > 0 ? `${shareOf(extract)} of the file is here` : "The file is not here yet";
};

/** An extract whose file is on its way, stopped on it, or did not arrive. */
export const AwaitingFile = ({ extract }: { extract: Extract }) => {
  const canEdit = useCan()("extract.edit");
  const upload = useUploadOf(extract.id);
  return (
    <>
      <h1 className="mb-3 text-[30px]">{titleOf(extract, upload !== undefined)}</h1>
      {upload ? (
        <UploadProgress extract={extract} upload={upload} />
      ) : (
        <>
          {extract.failure ? <Failure failure={extract.failure} /> : null}
          {extract.receivedBytes > 0 ? <WhatIsHere extract={extract} /> : null}
          {extract.receivedBytes === 0 && !extract.failure ? <Announced extract={extract} /> : null}
          {canEdit ? <SendAgain extract={extract} /> : null}
        </>
      )}
    </>
  );
};
