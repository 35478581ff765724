import { useSyncExternalStore } from "react";
import { z } from "zod";
import { LIMITS } from "#shared/limits.ts";
import { ApiError } from "#src/api/client.ts";
import { type ExtractShown, readExtract, removeExtract, sendPiece } from "#src/api/extracts.ts";

/** A file on its way. It goes on while other screens are looked at. */
export interface Upload {
  extractId: string;
  fileName: string;
  bytes: number;
  /** Bytes that have gone so far, those of the present piece included. */
  sent: number;
  /** Where it began this time, and when (milliseconds): for the time that is left. */
  from: number;
  since: number;
  /** checking: is it the file that was begun? · waiting: the connection is gone · finishing: all has gone */
  state: "checking" | "sending" | "waiting" | "paused" | "finishing" | "failed";
  error: unknown;
  /** The extract was taken back, as the same bytes are here already. */
  isTakenBack: boolean;
}

/** What is sent, where to, and what becomes of it. */
export interface Sending {
  programmeId: string;
  extractId: string;
  file: File;
  /** Bytes that the server has of it. */
  receivedBytes: number;
  /** Made for this file: taken back where the same bytes are here already. */
  isNew: boolean;
  onDone: (shown: ExtractShown) => void;
}

interface Running {
  upload: Upload;
  sending: Sending;
  /** It is the file that was begun. */
  isChecked: boolean;
  control: AbortController;
}

const running = new Map<string, Running>();
const listeners = new Set<() => void>();

const update = (run: Running, change: Partial<Upload>): void => {
  run.upload = { ...run.upload, ...change };
  for (const listener of listeners) listener();
};

const offsetDetails = z.object({ receivedBytes: z.int().min(0) });

const codeOf = (error: unknown): string => (error instanceof ApiError ? error.code : "");

/** Failures of the way that pass by themselves. */
const PASSING = [0, 408, 429, 502, 503, 504];
const isPassing = (error: unknown): boolean =>
  error instanceof ApiError && (PASSING.includes(error.status) || error.code === "piece-cut-off");

const paused = (): DOMException => new DOMException("The upload was paused.", "AbortError");

const LONGEST_WAIT_MS = 30_000;

/** Waits a while, less when the computer says that it is connected again; ends at once when aborted. */
const waitForConnection = (failures: number, signal: AbortSignal): Promise<void> =>
  new Promise((resolve, reject) => {
    const end = (): void => {
      clearTimeout(timer);
      window.removeEventListener("online", end);
      signal.removeEventListener("abort", end);
      if (signal.aborted) reject(paused());
      else resolve();
    };
    const timer = setTimeout(end, Math.min(LONGEST_WAIT_MS, 500 * 2 ** failures));
    window.addEventListener("online", end);
    signal.addEventListener("abort", end);
  });

const changedFile = (name: string): ApiError =>
  new ApiError(0, {
    code: "file-changed",
    message: `“${name}” cannot be read any more: it was changed, moved or taken away.`,
    hint: "Choose it again. What has arrived is kept.",
  });

/** The bytes themselves, so that a file that changed meanwhile is not taken for a lost connection. */
const pieceOf = async (file: File, offset: number, signal: AbortSignal): Promise<Blob> => {
  const bytes = await file
    .slice(offset, offset + LIMITS.pieceBytes)
    .arrayBuffer()
    .catch(() => {
      throw changedFile(file.name);
    });
  if (signal.aborted) throw paused();
  return new Blob([bytes]);
};

/** Sends one piece, as often as it takes. */
const sendOne = async (
  run: Running,
  offset: number,
  piece: Blob,
  signal: AbortSignal,
): Promise<ExtractShown> => {
  const { programmeId, extractId } = run.sending;
  const state = run.upload.state;
  for (let failures = 0; ; failures++) {
    try {
      const onProgress = (sent: number): void => {
        if (state !== "checking") update(run, { sent: offset + Math.min(sent, piece.size) });
      };
      return await sendPiece(programmeId, extractId, { offset, piece }, onProgress, signal);
    } catch (error) {
      if (!isPassing(error)) throw error;
      update(run, { state: "waiting", sent: offset });
      await waitForConnection(failures, signal);
      update(run, { state });
    }
  }
};

/** Where to go on when the server has more or less than was thought; undefined for any other failure. */
const whereToGoOn = (error: unknown): number | undefined =>
  error instanceof ApiError && error.code === "upload-offset"
    ? offsetDetails.safeParse(error.details).data?.receivedBytes
    : undefined;

const sendRest = async (run: Running, signal: AbortSignal): Promise<ExtractShown> => {
  const { file } = run.sending;
  let offset = run.sending.receivedBytes;
  for (let corrections = 0; ; ) {
    const piece = await pieceOf(file, offset, signal);
    update(run, { state: offset + piece.size < file.size ? "sending" : "finishing", sent: offset });
    try {
      const shown = await sendOne(run, offset, piece, signal);
      if (shown.extract.state !== "receiving") return shown;
      offset = shown.extract.receivedBytes;
    } catch (error) {
      const there = whereToGoOn(error);
      if (there === undefined || ++corrections > 3) throw error;
      offset = there;
    }
    run.sending.receivedBytes = offset;
  }
};

/** The first piece once more: the server compares it with what it has. */
const check = async (run: Running, signal: AbortSignal): Promise<void> => {
  const { file, receivedBytes } = run.sending;
  if (receivedBytes === 0) return;
  const piece = await pieceOf(file, 0, signal);
  await sendOne(run, 0, piece.slice(0, receivedBytes), signal);
};

const sendAll = async (run: Running, signal: AbortSignal): Promise<ExtractShown> => {
  const { programmeId, extractId } = run.sending;
  try {
    if (run.upload.state === "checking") await check(run, signal);
    run.isChecked = true;
    update(run, { since: Date.now(), from: run.sending.receivedBytes });
    return await sendRest(run, signal);
  } catch (error) {
    // The answer to the last piece was lost on its way.
    if (codeOf(error) === "file-already-received") return readExtract(programmeId, extractId);
    throw error;
  }
};

const go = async (run: Running): Promise<void> => {
  const { programmeId, extractId, isNew, onDone } = run.sending;
  const { signal } = run.control;
  try {
    const shown = await sendAll(run, signal);
    onDone(shown);
    if (!signal.aborted) dropUpload(extractId);
  } catch (error) {
    if (signal.aborted) return;
    const isTakenBack = isNew && codeOf(error) === "extract-already-here";
    // Said first: the page then no longer asks for an extract that is going.
    update(run, { state: "failed", error, isTakenBack });
    if (isTakenBack) await removeExtract(programmeId, extractId).catch(() => undefined);
  }
};

/** Sends a file as that of an extract, from where the server has come. */
export const startUpload = (sending: Sending): void => {
  dropUpload(sending.extractId);
  const { extractId, file, receivedBytes } = sending;
  const run: Running = {
    sending,
    isChecked: receivedBytes === 0,
    control: new AbortController(),
    upload: {
      extractId,
      fileName: file.name,
      bytes: file.size,
      sent: receivedBytes,
      from: receivedBytes,
      since: Date.now(),
      state: receivedBytes > 0 ? "checking" : "sending",
      error: null,
      isTakenBack: false,
    },
  };
  running.set(extractId, run);
  update(run, {});
  void go(run);
};

export const pauseUpload = (extractId: string): void => {
  const run = running.get(extractId);
  if (!run) return;
  run.control.abort();
  update(run, { state: "paused", sent: run.sending.receivedBytes });
};

/** Goes on after a pause or a failure. */
export const goOnWithUpload = (extractId: string): void => {
  const run = running.get(extractId);
  if (!run || (run.upload.state !== "paused" && run.upload.state !== "failed")) return;
  run.control = new AbortController();
  update(run, { state: run.isChecked ? "sending" : "checking", error: null });
  void go(run);
};

/** Ends the sending here; what has arrived stays with the server. */
export const dropUpload = (extractId: string): void => {
  const run = running.get(extractId);
  if (!run) return;
  run.control.abort();
  running.delete(extractId);
  for (const listener of listeners) listener();
};

const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** The upload of that extract from this window, if there is one. */
export const useUploadOf = (extractId: string): Upload | undefined =>
  useSyncExternalStore(subscribe, () => running.get(extractId)?.upload);
