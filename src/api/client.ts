import { type ErrorBody, errorBody } from "#shared/api/common.ts";
import type { Session } from "#shared/api/session.ts";

/** A refusal or failure of the server, or of the way to it, as screens show it. */
export class ApiError extends Error {
  readonly code: string;
  readonly hint: string | undefined;
  readonly fields: Readonly<Record<string, string>>;
  readonly details: unknown;

  constructor(
    readonly status: number,
    body: ErrorBody["error"],
  ) {
    super(body.message);
    this.name = "ApiError";
    this.code = body.code;
    this.hint = body.hint;
    this.fields = body.fields ?? {};
    this.details = body.details;
  }
}

const UNREACHABLE: ErrorBody["error"] = {
  code: "unreachable",
  message: "The server cannot be reached.",
  hint: "What you see may be out of date. Check the connection and try again.",
};

/** Of the session answered last: the token goes with every request that changes something. */
let known: { csrfToken: string; personId: string | null } = { csrfToken: "", personId: null };
export const keepSession = ({ csrfToken, person }: Session): void => {
  known = { csrfToken, personId: person?.id ?? null };
};

let signedOut = (): void => undefined;
/** Says what happens when the server no longer knows the person: the application leads to the sign-in page. */
export const whenSignedOut = (leave: () => void): void => {
  signedOut = leave;
};

export const readError = async (response: Response): Promise<ApiError> => {
  const parsed = errorBody.safeParse(await response.json().catch(() => null));
  return new ApiError(
    response.status,
    parsed.success
      ? parsed.data.error
      : {
          code: "unreadable-answer",
          message: `The server answered ${response.status} and nothing that can be read.`,
          hint: "Try again in a moment.",
        },
  );
};

type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

const once = async <T>(method: Method, path: string, body?: unknown, signal?: AbortSignal): Promise<T> => {
  const headers: Record<string, string> = { Accept: "application/json" };
  if (method !== "GET") headers["X-CSRF-Token"] = known.csrfToken;
  if (body !== undefined) headers["Content-Type"] = "application/json";
  const response = await fetch(`/api${path}`, {
    method,
    headers,
    credentials: "same-origin",
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
  }).catch((error: unknown) => {
    if (error instanceof DOMException && error.name === "AbortError") throw error;
    throw new ApiError(0, UNREACHABLE);
  });
  if (!response.ok) throw await readError(response);
  return (response.status === 204 ? undefined : await response.json()) as T;
};

const isOfSession = (error: unknown): error is ApiError =>
  error instanceof ApiError && (error.code === "stale-page" || error.code === "signed-out");

/**
 * Reads the session anew, and answers whether the same request may be sent again: as a visitor's, or as the same
 * person's. Another person may have signed in meanwhile in this browser; nothing is done in their name.
 */
const isStillTheirs = async (): Promise<boolean> => {
  const before = known.personId;
  const { session } = await once<{ session: Session }>("GET", "/session");
  keepSession(session);
  return before === null || session.person?.id === before;
};

/** Tries once more where only the session's token was old. */
const withSession = async <T>(attempt: () => Promise<T>): Promise<T> => {
  try {
    return await attempt().catch(async (error: unknown) => {
      if (isOfSession(error) && (await isStillTheirs())) return attempt();
      throw error;
    });
  } catch (error) {
    if (error instanceof ApiError && error.code === "signed-out") signedOut();
    throw error;
  }
};

/** Sends JSON and reads JSON; throws ApiError. The shape is the one the contract in shared/api states. */
export const request = <T>(method: Method, path: string, body?: unknown, signal?: AbortSignal): Promise<T> =>
  withSession(() => once<T>(method, path, body, signal));

export const get = <T>(path: string, signal?: AbortSignal): Promise<T> =>
  request<T>("GET", path, undefined, signal);

/** Sends a file as it is, telling how many bytes have gone. */
export const sendFile = <T>(
  path: string,
  file: Blob,
  onProgress: (sent: number) => void,
  signal: AbortSignal,
): Promise<T> => withSession(() => sendFileOnce<T>(path, file, onProgress, signal));

const sendFileOnce = <T>(
  path: string,
  file: Blob,
  onProgress: (sent: number) => void,
  signal: AbortSignal,
): Promise<T> =>
  new Promise((resolve, reject) => {
    const upload = new XMLHttpRequest();
    upload.open("PUT", `/api${path}`);
    upload.setRequestHeader("Content-Type", "application/octet-stream");
    upload.setRequestHeader("X-CSRF-Token", known.csrfToken);
    upload.upload.onprogress = (event) => onProgress(event.loaded);
    upload.onerror = () => reject(new ApiError(0, UNREACHABLE));
    upload.onabort = () => reject(new DOMException("The upload was cancelled.", "AbortError"));
    upload.onload = async () => {
      const response = new Response(upload.responseText || null, { status: upload.status });
      if (response.ok) resolve(JSON.parse(upload.responseText) as T);
      else reject(await readError(response));
    };
    signal.addEventListener("abort", () => upload.abort(), { once: true });
    upload.send(file);
  });
