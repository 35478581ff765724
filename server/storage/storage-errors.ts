import { AppError } from "../errors.ts";

/** The disk or its quota is full. Whoever was writing has kept nothing. */
export class StorageFullError extends AppError {
  constructor(cause?: unknown) {
    super(
      507,
      "storage-full",
      "There is no room left where files are kept, so this file was not stored. Nothing else has changed.",
      { hint: "Ask whoever runs this installation to make room, then send the file again.", cause },
    );
  }
}

export class FileTooLargeError extends AppError {
  constructor(readonly limitBytes: number) {
    super(
      413,
      "file-too-large",
      `The file is larger than ${describeBytes(limitBytes)}, the most that is taken here. Nothing of it was kept.`,
      {
        hint: "Leave out columns or stars that are not needed, or split the file and bring the parts one by one.",
      },
    );
  }
}

const FULL = new Set(["ENOSPC", "EDQUOT", "EFBIG"]);

/** The error a person should read for that failure of the file system; others are passed through. */
export const storageError = (error: unknown): unknown => {
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  return FULL.has(code) ? new StorageFullError(error) : error;
};

const describeBytes = (bytes: number): string => {
  const units = ["bytes", "KiB", "MiB", "GiB", "TiB"];
  const step = Math.min(units.length - 1, Math.floor(Math.log2(Math.max(1, bytes)) / 10));
  return `${Number((bytes / 1024 ** step).toFixed(1))} ${units[step]}`;
};
