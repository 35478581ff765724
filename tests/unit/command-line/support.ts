import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Writable } from "node:stream";
import { afterAll } from "vitest";
import { runCommandLine } from "#server/command-line/run.ts";

export interface Ended {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

class Memory extends Writable {
  private readonly pieces: Buffer[] = [];

  override _write(piece: Buffer, _: string, done: () => void): void {
    this.pieces.push(piece);
    done();
  }

  get text(): string {
    return Buffer.concat(this.pieces).toString("utf8");
  }
}

/** A folder of its own for a test file, gone after it. */
export const ownFolder = (): { folder: string; put(name: string, content: string | Uint8Array): string } => {
  const folder = mkdtempSync(join(tmpdir(), "shortlight-command-"));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return {
    folder,
    put(name, content) {
      writeFileSync(join(folder, name), content);
      return name;
    },
  };
};

export const readIn = (folder: string, name: string): string => readFileSync(join(folder, name), "utf8");

/** Runs a command in this process. */
export const run = async (folder: string, ...args: string[]): Promise<Ended> => {
  const [out, err] = [new Memory(), new Memory()];
  const code = await runCommandLine(args, { folder, out, err });
  return { code, out: out.text, err: err.text };
};
