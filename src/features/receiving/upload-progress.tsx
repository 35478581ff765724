import { useState } from "react";
import type { Extract } from "#shared/api/extracts.ts";
import { ApiError } from "#src/api/client.ts";
import { Button } from "#src/ui/button.tsx";
import { LevelMark } from "#src/ui/level-mark.tsx";
import { Progress } from "#src/ui/progress.tsx";
import { DeleteDialog } from "./delete-dialog.tsx";
import { UploadProblem } from "./upload-problem.tsx";
import { dropUpload, goOnWithUpload, pauseUpload, type Upload } from "./uploads.ts";

const LABELS: Readonly<Record<Upload["state"], string>> = {
  checking: "Comparing the file with what is here",
  sending: "Sending",
  waiting: "Waiting for the connection",
  paused: "Paused",
  finishing: "Finishing: the whole file is looked at",
  failed: "Stopped",
};

/** The time that is left is guessed only once a tenth is done. */
const GUESS_FROM = 0.1;

const timeLeft = ({ state, sent, bytes, from, since }: Upload): string => {
  const done = sent - from;
  if (state !== "sending" || done < GUESS_FROM * (bytes - from)) return "";
  const seconds = ((bytes - sent) * (Date.now() - since)) / 1000 / done;
  if (seconds < 60) return "less than a minute left";
  return `about ${Math.ceil(seconds / 60)} min left`;
};

const Words = ({ upload }: { upload: Upload }) => {
  if (upload.state === "waiting")
    return (
      <p role="status">
        <LevelMark level="note" /> The server cannot be reached just now. What has arrived is kept; sending
        goes on by itself.
      </p>
    );
  if (upload.state === "paused")
    return <p role="status">What has arrived is kept for a week. Go on when you like.</p>;
  return (
    <p className="text-soft">
      You may go on to other screens meanwhile. If this window closes, come back here and choose the same
      file: it goes on from where it stopped. <span className="whitespace-nowrap">{timeLeft(upload)}</span>
    </p>
  );
};

/** Refusals that the same file meets again. */
const OF_THE_FILE = ["other-file", "file-changed", "upload-too-long", "extract-already-here"];
const isOfTheFile = (error: unknown): boolean =>
  error instanceof ApiError && OF_THE_FILE.includes(error.code);

const OnButton = ({ upload: { extractId, state, error } }: { upload: Upload }) => {
  if (state === "failed" && isOfTheFile(error))
    return (
      <Button kind="main" onClick={() => dropUpload(extractId)}>
        Choose the file again
      </Button>
    );
  if (state === "failed" || state === "paused")
    return (
      <Button kind="main" onClick={() => goOnWithUpload(extractId)}>
        {state === "failed" ? "Try again" : "Go on sending"}
      </Button>
    );
  return (
    <Button disabled={state === "finishing"} onClick={() => pauseUpload(extractId)}>
      Pause
    </Button>
  );
};

/** A file on its way from this window: how far it is, and the ways to hold it, go on with it and leave it. */
export const UploadProgress = ({ extract, upload }: { extract: Extract; upload: Upload }) => {
  const [isLeaving, setLeaving] = useState(false);
  const { state } = upload;
  if (upload.isTakenBack) return <UploadProblem error={upload.error} />;
  return (
    <div className="flex max-w-xl flex-col gap-3">
      {state === "failed" ? <UploadProblem error={upload.error} /> : null}
      <Progress
        label={`${LABELS[state]}: ${upload.fileName}`}
        done={upload.sent}
        total={upload.bytes}
        unit="bytes"
      />
      {state === "failed" ? null : <Words upload={upload} />}
      <div className="flex flex-wrap gap-2">
        <OnButton upload={upload} />
        <Button onClick={() => setLeaving(true)}>Cancel the upload</Button>
      </div>
      <DeleteDialog extract={extract} isOpen={isLeaving} onClose={() => setLeaving(false)} />
    </div>
  );
};
