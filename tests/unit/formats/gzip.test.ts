import { gzipSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { Gunzip } from "#server/formats/gzip.ts";
import { inPieces } from "./ecsv/support.ts";

const TEXT = Array.from({ length: 3000 }, (_, i) => `star ${i},${Math.sin(i)}\n`).join("");
const PACKED = gzipSync(TEXT);

const unpack = async (
  bytes: Uint8Array,
  limits?: ConstructorParameters<typeof Gunzip>[1],
): Promise<string> => {
  const pieces: Uint8Array[] = [];
  for await (const piece of new Gunzip(inPieces(bytes, 1013), limits)) pieces.push(piece);
  return Buffer.concat(pieces).toString();
};

describe("a gzip file", () => {
  test("comes out as it was, of one member or of several", async () => {
    expect(await unpack(PACKED)).toBe(TEXT);
    expect(await unpack(Buffer.concat([PACKED, gzipSync("and more\n"), gzipSync("")]))).toBe(
      `${TEXT}and more\n`,
    );
  });

  test("counts what has been taken of it", async () => {
    const gunzip = new Gunzip(inPieces(PACKED, 100));
    for await (const _ of gunzip);
    expect(gunzip.packed).toBe(PACKED.length);
  });

  test.each([5, 12, 200, PACKED.length - 9, PACKED.length - 1])(
    "cut off after %i bytes it ends in the middle",
    async (length) => {
      await expect(unpack(PACKED.subarray(0, length))).rejects.toMatchObject({
        code: "file-cut-off",
        message: expect.stringContaining("ends in the middle"),
      });
    },
  );

  test("with a damaged member it is refused in words", async () => {
    const damaged = Buffer.from(PACKED);
    damaged.fill(0x55, 300, 340);
    await expect(unpack(damaged)).rejects.toMatchObject({ code: "gzip-broken", hint: expect.any(String) });
    const sum = Buffer.from(PACKED);
    sum[PACKED.length - 8] = (sum[PACKED.length - 8] ?? 0) ^ 1;
    await expect(unpack(sum)).rejects.toMatchObject({ code: "gzip-broken" });
  });

  test("may be filled up with zeros, but a member behind them is not lost silently", async () => {
    expect(await unpack(Buffer.concat([PACKED, Buffer.alloc(5000)]))).toBe(TEXT);
    for (const behind of [
      [0, 1],
      [...Buffer.from("words that are not packed")],
      [...Buffer.alloc(5000), ...gzipSync("lost\n")],
    ])
      await expect(unpack(Buffer.concat([PACKED, Buffer.from(behind)]))).rejects.toMatchObject({
        code: "gzip-broken",
      });
  });

  test("is stopped at the limit, which is named", async () => {
    const limits = { bytes: 3 * 1024 ** 2, ratio: 1e9, ratioFrom: 0 };
    await expect(unpack(gzipSync("x".repeat(4 * 1024 ** 2)), limits)).rejects.toThrow(/more than 3 MB/);
  });

  test("that grows as no table does is stopped early", async () => {
    const limits = { bytes: 1e12, ratio: 300, ratioFrom: 1024 ** 2 };
    await expect(unpack(gzipSync("x".repeat(8 * 1024 ** 2)), limits)).rejects.toMatchObject({
      code: "gzip-too-dense",
      message: expect.stringContaining("300 times"),
    });
    expect((await unpack(PACKED, limits)).length).toBe(TEXT.length);
  });

  test("lets its source go when its reader stops early", async () => {
    let isOpen = true;
    async function* source(): AsyncGenerator<Uint8Array> {
      try {
        yield* inPieces(
          gzipSync(Buffer.from(Array.from({ length: 3e5 }, () => Math.floor(Math.random() * 256)))),
          4096,
        );
      } finally {
        isOpen = false;
      }
    }
    for await (const _ of new Gunzip(source())) break;
    await expect.poll(() => isOpen).toBe(false);
  });
});
