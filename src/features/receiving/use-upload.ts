import { useEffect, useRef, useState } from "react";
import type { ExtractShown, NewExtract } from "#src/api/extracts.ts";
import { makeExtract, removeExtract, sendOriginal, useKeepExtract } from "#src/api/extracts.ts";

interface Upload {
  sent: number;
  bytes: number;
}

const isCancel = (error: unknown): boolean => error instanceof DOMException && error.name === "AbortError";

/**
 * Sends a file as a new extract, or as the file of one that still waits for it. A new extract whose file does not
 * arrive is taken back.
 */
export const useUpload = (programmeId: string, onDone: (shown: ExtractShown) => void) => {
  const keep = useKeepExtract(programmeId);
  const [upload, setUpload] = useState<Upload | null>(null);
  const [error, setError] = useState<unknown>(null);
  const abort = useRef<AbortController>(undefined);
  // A closed page ends its upload; the server keeps nothing of half a file.
  useEffect(() => () => abort.current?.abort(), []);

  const send = async (file: File, goal: NewExtract | string): Promise<void> => {
    const control = new AbortController();
    abort.current = control;
    setError(null);
    setUpload({ sent: 0, bytes: file.size });
    let made: string | null = null;
    try {
      if (typeof goal !== "string") made = (await makeExtract(programmeId, goal)).id;
      const id = made ?? (goal as string);
      if (control.signal.aborted) throw new DOMException("The upload was cancelled.", "AbortError");
      const progress = (sent: number) => setUpload({ sent: Math.min(sent, file.size), bytes: file.size });
      const shown = await sendOriginal(programmeId, id, file, progress, control.signal);
      keep(shown);
      onDone(shown);
    } catch (problem) {
      if (made) await removeExtract(programmeId, made).catch(() => undefined);
      if (!isCancel(problem)) setError(problem);
    } finally {
      setUpload(null);
    }
  };

  return { upload, error, send, cancel: () => abort.current?.abort(), forget: () => setError(null) };
};
