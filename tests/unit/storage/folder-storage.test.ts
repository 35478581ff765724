import { createHash } from "node:crypto";
import { existsSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import { buffer, text } from "node:stream/consumers";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { AppError } from "#server/errors.ts";
import { FolderStorage } from "#server/storage/folder-storage.ts";
import { FileTooLargeError, StorageFullError, storageError } from "#server/storage/storage-errors.ts";

let root: string;
let files: FolderStorage;
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), "shortlight-storage-"));
  files = new FolderStorage(root);
});
afterEach(() => rmSync(root, { recursive: true }));

const KEY = "programmes/1/extracts/2/original";
const from = (...parts: string[]) => Readable.from(parts.map((part) => Buffer.from(part)));

const leftAside = (): string[] => readdirSync(join(root, ".incoming"));

describe("writing", () => {
  test("keeps the bytes and tells their number and hash", async () => {
    const written = await files.write(KEY, from("source_id\n", "5853498713190525696\n"));
    const expected = "source_id\n5853498713190525696\n";
    expect(written).toEqual({ bytes: 30, sha256: createHash("sha256").update(expected).digest("hex") });
    expect(await text(await files.read(KEY))).toBe(expected);
    expect(await files.stat(KEY)).toMatchObject({ bytes: 30 });
    expect(leftAside()).toEqual([]);
  });

  test("past the limit nothing is kept, and what was there stays", async () => {
    await files.write(KEY, from("first"));
    const tooLong = files.write(KEY, from("12345", "67890", "1"), { limitBytes: 10 });
    await expect(tooLong).rejects.toBeInstanceOf(FileTooLargeError);
    expect(await text(await files.read(KEY))).toBe("first");
    expect(leftAside()).toEqual([]);
  });

  test("a source that breaks off leaves nothing", async () => {
    const broken = Readable.from(
      (async function* () {
        yield Buffer.from("half");
        throw new Error("connection lost");
      })(),
    );
    await expect(files.write(KEY, broken)).rejects.toThrow("connection lost");
    expect(await files.stat(KEY)).toBeNull();
    expect(leftAside()).toEqual([]);
  });

  test("exactly as many bytes as allowed are allowed", async () => {
    expect(await files.write(KEY, from("1234567890"), { limitBytes: 10 })).toMatchObject({ bytes: 10 });
  });
});

describe("a file that grows", () => {
  test("takes piece after piece at its end", async () => {
    expect(await files.append(KEY, 0, from("source_id\n"))).toBe(10);
    expect(await files.append(KEY, 10, from("58534", "98713\n"))).toBe(21);
    expect(await text(await files.read(KEY))).toBe("source_id\n5853498713\n");
  });

  test("takes a piece again whose outcome was not known", async () => {
    await files.append(KEY, 0, from("first "));
    await files.append(KEY, 6, from("second, longer"));
    expect(await files.append(KEY, 6, from("second"))).toBe(12);
    expect(await text(await files.read(KEY))).toBe("first second");
  });

  test("keeps what it had when a piece breaks off, once the next is put", async () => {
    await files.append(KEY, 0, from("first "));
    const broken = Readable.from(
      (async function* () {
        yield Buffer.from("sec");
        throw new Error("connection lost");
      })(),
    );
    await expect(files.append(KEY, 6, broken)).rejects.toThrow("connection lost");
    await files.append(KEY, 6, from("second"));
    expect(await text(await files.read(KEY))).toBe("first second");
  });

  test("has no holes", async () => {
    await files.append(KEY, 0, from("first"));
    await expect(files.append(KEY, 6, from("second"))).rejects.toThrow("fewer than 6 bytes");
    await expect(files.append("programmes/1/none", 6, from("second"))).rejects.toThrow();
    expect(await text(await files.read(KEY))).toBe("first");
  });
});

describe("reading", () => {
  test("a range includes both its ends", async () => {
    await files.write(KEY, from("0123456789"));
    expect((await buffer(await files.read(KEY, { start: 2, end: 4 }))).toString()).toBe("234");
  });

  test("a file that is not there is refused before the first byte", async () => {
    const refusal = await files.read("no/such/file").catch((error: unknown) => error);
    expect(refusal).toBeInstanceOf(AppError);
    expect(refusal).toMatchObject({ status: 404 });
  });

  test("removing takes it away, and twice is fine", async () => {
    await files.write(KEY, from("x"));
    await files.remove(KEY);
    await files.remove(KEY);
    expect(await files.stat(KEY)).toBeNull();
  });
});

test.each([
  "../outside",
  "a/../../outside",
  "/etc/passwd",
  ".incoming/x",
  "a//b",
  "a/",
  "",
  "a\0b",
  "a\\..\\b",
])("no key leads out of the folder: %j", async (key) => {
  await expect(files.write(key, from("x"))).rejects.toThrow("Not a storage key");
  await expect(files.read(key)).rejects.toThrow("Not a storage key");
  await expect(files.remove(key)).rejects.toThrow("Not a storage key");
  expect(existsSync(join(root, "../outside"))).toBe(false);
});

test("a full disk becomes a message that says what to do; other failures stay as they are", () => {
  const full = storageError(Object.assign(new Error("ENOSPC: no space left on device"), { code: "ENOSPC" }));
  expect(full).toBeInstanceOf(StorageFullError);
  expect(full).toMatchObject({
    status: 507,
    code: "storage-full",
    hint: expect.stringContaining("make room"),
  });
  const other = new Error("EIO");
  expect(storageError(other)).toBe(other);
});
