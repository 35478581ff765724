import { configure, fireEvent, screen, waitFor } from "@testing-library/react";
import { Route, Routes } from "react-router-dom";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Extract } from "#shared/api/extracts.ts";
import { LIMITS } from "#shared/limits.ts";
import { keepSession } from "#src/api/client.ts";
import { ExtractPage } from "#src/features/receiving/extract-page.tsx";
import { dropUpload } from "#src/features/receiving/uploads.ts";
import { answerWith, openAt, PERSON, refusal, sessionOf } from "../people/support.tsx";
import { extract as plain, preview } from "./fixtures.ts";

configure({ asyncUtilTimeout: 10_000 });

const MIB = 1024 ** 2;
const SIZE = 20 * MIB;

/** Stands for the server's part of an upload: takes pieces at the end of what it has, or fails as it is told. */
const server = {
  extract: plain as Extract,
  received: new Uint8Array(SIZE),
  log: [] as string[],
  /** What the next pieces meet instead of being taken. */
  troubles: [] as (number | "hold" | { status: number; body: unknown })[],
};

const take = (offset: number, piece: Uint8Array): { status: number; body: unknown } => {
  const { receivedBytes } = server.extract;
  const end = offset + piece.length;
  if (offset < receivedBytes && end <= receivedBytes) {
    const isSame = Buffer.from(piece).equals(server.received.subarray(offset, end));
    if (!isSame) return { status: 409, body: refusal("other-file", "This is another file.") };
    return { status: 200, body: { extract: server.extract, preview: null } };
  }
  if (offset !== receivedBytes)
    return { status: 409, body: refusal("upload-offset", "Go on there.", { details: { receivedBytes } }) };
  server.received.set(piece, offset);
  const state = end === server.extract.bytes ? "planning" : "receiving";
  server.extract = { ...server.extract, receivedBytes: end, state };
  return { status: 200, body: { extract: server.extract, preview: state === "planning" ? preview : null } };
};

class FakeRequest {
  status = 0;
  responseText = "";
  upload: { onprogress?: (event: { loaded: number }) => void } = {};
  onload: () => void = () => undefined;
  onerror: () => void = () => undefined;
  onabort: () => void = () => undefined;
  private offset = 0;
  open(_method: string, path: string): void {
    this.offset = Number(new URL(path, "http://here").searchParams.get("offset"));
  }
  setRequestHeader(): void {}
  abort(): void {
    this.onabort();
  }
  send(piece: Blob): void {
    void piece.arrayBuffer().then((buffer) => {
      const trouble = server.troubles.shift();
      server.log.push(`${this.offset / MIB}+${buffer.byteLength / MIB}`);
      if (trouble === "hold") return;
      if (trouble === 0) return this.onerror();
      const { status, body } =
        trouble === undefined
          ? take(this.offset, new Uint8Array(buffer))
          : typeof trouble === "number"
            ? { status: trouble, body: refusal("trouble", "Not now.") }
            : trouble;
      this.status = status;
      this.responseText = JSON.stringify(body);
      this.onload();
    });
  }
}

const bytes = (seed: number): Uint8Array<ArrayBuffer> => {
  const made = new Uint8Array(SIZE);
  for (let i = 0; i < SIZE; i++) made[i] = (i * seed) % 251;
  return made;
};
const isWhole = (): boolean => Buffer.from(server.received.buffer).equals(bytes(7));
const fileOf = (seed = 7, name = "south.csv"): File => new File([bytes(seed)], name);

const openExtract = (receivedBytes = 0) => {
  const session = sessionOf({
    person: PERSON,
    programmes: [{ id: "9", name: "Small Suns", roles: ["curator"], isInvented: true }],
  });
  keepSession(session);
  server.extract = { ...plain, state: "receiving", bytes: SIZE, receivedBytes, sha256: null };
  server.received.set(bytes(7).subarray(0, receivedBytes));
  answerWith(({ path }) =>
    path === "/api/session"
      ? { status: 200, body: { session } }
      : {
          status: 200,
          body: { extract: server.extract, preview: server.extract.state === "planning" ? preview : null },
        },
  );
  openAt(
    "/programmes/9/extracts/5",
    <Routes>
      <Route path="/programmes/:programmeId/extracts/:extractId" element={<ExtractPage />} />
    </Routes>,
  );
};

const choose = async (file: File): Promise<void> => {
  const input = await screen.findByLabelText<HTMLInputElement>(/^Choose (file|another file)$/);
  fireEvent.change(input, { target: { files: [file] } });
};
const press = (name: string): void => {
  fireEvent.click(screen.getByRole("button", { name }));
};

beforeEach(() => {
  vi.stubGlobal("XMLHttpRequest", FakeRequest);
  server.received = new Uint8Array(SIZE);
  server.log = [];
  server.troubles = [];
});
afterEach(() => dropUpload("5"));

describe("a file that is sent", () => {
  test("goes in pieces, then its plan is asked for", async () => {
    openExtract();
    await choose(fileOf());
    press("Send file");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(LIMITS.pieceBytes).toBe(8 * MIB);
    expect(server.log).toEqual(["0+8", "8+8", "16+4"]);
    expect(isWhole()).toBe(true);
  });

  test("waits while the server cannot be reached, and goes on by itself", async () => {
    openExtract();
    server.troubles = [undefined as never, 0];
    await choose(fileOf());
    press("Send file");
    await screen.findByText(/The server cannot be reached just now/);
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(server.log).toEqual(["0+8", "8+8", "8+8", "16+4"]);
  });

  test("goes on from where the server says", async () => {
    openExtract();
    await choose(fileOf());
    server.extract = { ...server.extract, receivedBytes: 8 * MIB };
    server.received.set(bytes(7).subarray(0, 8 * MIB));
    server.troubles = [
      { status: 409, body: refusal("upload-offset", "There.", { details: { receivedBytes: 8 * MIB } }) },
    ];
    press("Send file");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(server.log).toEqual(["0+8", "8+8", "16+4"]);
  });

  test("can be held and gone on with, keeping what has arrived", async () => {
    openExtract();
    server.troubles = [undefined as never, "hold"];
    await choose(fileOf());
    press("Send file");
    await waitFor(() => expect(server.log).toHaveLength(2));
    press("Pause");
    await screen.findByText(/^Paused:/);
    expect(screen.getByRole("progressbar").getAttribute("aria-valuenow")).toBe(String(8 * MIB));
    press("Go on sending");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(isWhole()).toBe(true);
  });

  test("says why it stopped, and can be tried again", async () => {
    openExtract();
    server.troubles = [
      { status: 507, body: refusal("storage-full", "There is no room left.", { hint: "Make room." }) },
    ];
    await choose(fileOf());
    press("Send file");
    expect((await screen.findByRole("alert")).textContent).toContain("There is no room left.");
    press("Try again");
    await screen.findByRole("heading", { name: "How should this file be read?" });
  });
});

describe("a file of which a part is here", () => {
  test("says how much, compares the beginning and sends the rest alone", async () => {
    openExtract(12 * MIB);
    await screen.findByRole("heading", { name: "60 % of the file is here" });
    await choose(fileOf());
    press("Go on sending");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(server.log).toEqual(["0+8", "12+8"]);
    expect(isWhole()).toBe(true);
  });

  test.each([
    ["another size", new File(["1,2"], "south.csv"), "was announced with"],
    ["another name", new File([bytes(7)], "north.csv"), "This is north.csv"],
  ])("refuses one of %s before anything is sent", async (_what, file, words) => {
    openExtract(12 * MIB);
    await choose(file);
    await screen.findByText(new RegExp(words));
    expect(screen.getByRole<HTMLButtonElement>("button", { name: "Go on sending" }).disabled).toBe(true);
    expect(server.log).toEqual([]);
  });

  test("refuses one whose beginning differs, and another can be chosen", async () => {
    openExtract(12 * MIB);
    await choose(fileOf(11));
    press("Go on sending");
    expect((await screen.findByRole("alert")).textContent).toContain("This is another file.");
    press("Choose the file again");
    await choose(fileOf(7));
    press("Go on sending");
    await screen.findByRole("heading", { name: "How should this file be read?" });
    expect(isWhole()).toBe(true);
  });
});
