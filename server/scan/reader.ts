import { mkdirSync } from "node:fs";
import { stat } from "node:fs/promises";
import { join } from "node:path";
import { type DuckDBConnection, DuckDBInstance, type DuckDBResult } from "@duckdb/node-api";
import type { Deps } from "../deps.ts";

/** Of all indexes together that this process has open. */
const MEMORY = "96MB";
const MOST_ATTACHED = 6;
const MOST_AT_ONCE = 3;

interface Attached {
  path: string;
  alias: string;
  /** Which file it is: a file that was built anew has the same path and another of these. */
  identity: string;
  users: number;
  usedAt: number;
}

/** The files of indexes, open for reading in one DuckDB instance with one memory limit; least recently used closed. */
export class ScanReader {
  private instance: Promise<DuckDBInstance> | undefined;
  private attached: Attached[] = [];
  /** Opening and closing happen one after the other. */
  private doorway: Promise<unknown> = Promise.resolve();
  private readonly waiting: (() => void)[] = [];
  private running = 0;
  private count = 0;

  constructor(private readonly deps: Deps) {}

  /** Names the file's present content; undefined while there is no such file. */
  async identityOf(path: string): Promise<string | undefined> {
    const found = await stat(path, { bigint: true }).catch(() => undefined);
    return found && `${found.ino}-${found.mtimeNs}`;
  }

  /** Runs the work with a connection on which the tables of that index can be named as they are. */
  async use<T>(
    path: string,
    identity: string,
    work: (connection: DuckDBConnection) => Promise<T>,
  ): Promise<T> {
    await this.takeTurn();
    try {
      const index = await this.enter(path, identity);
      try {
        return await this.withConnection(async (connection) => {
          await connection.run(`USE ${index.alias}`);
          return work(connection);
        });
      } finally {
        index.users--;
        index.usedAt = performance.now();
      }
    } finally {
      this.running--;
      this.waiting.shift()?.();
    }
  }

  private async takeTurn(): Promise<void> {
    while (this.running >= MOST_AT_ONCE) await new Promise<void>((resolve) => this.waiting.push(resolve));
    this.running++;
  }

  private open(): Promise<DuckDBInstance> {
    const spill = join(this.deps.config.folders.scan, "spill");
    mkdirSync(spill, { recursive: true });
    this.instance ??= DuckDBInstance.create(":memory:", {
      memory_limit: MEMORY,
      threads: "2",
      preserve_insertion_order: "false",
      temp_directory: spill,
    });
    return this.instance;
  }

  private async withConnection<T>(work: (connection: DuckDBConnection) => Promise<T>): Promise<T> {
    const connection = await (await this.open()).connect();
    try {
      return await work(connection);
    } finally {
      connection.closeSync();
    }
  }

  /** The open index, counted as in use, so that nobody closes it meanwhile. */
  private enter(path: string, identity: string): Promise<Attached> {
    const entering = this.doorway.then(async () => {
      const known = this.attached.find((a) => a.path === path && a.identity === identity);
      const index = known ?? (await this.attach(path, identity));
      index.users++;
      return index;
    });
    this.doorway = entering.catch(() => undefined);
    return entering;
  }

  private async attach(path: string, identity: string): Promise<Attached> {
    await this.makeRoom(path);
    const alias = `scan_${++this.count}`;
    await this.withConnection((c) => c.run(`ATTACH '${path.replaceAll("'", "''")}' AS ${alias} (READ_ONLY)`));
    const index = { path, alias, identity, users: 0, usedAt: performance.now() };
    this.attached.push(index);
    return index;
  }

  /** Closes what this path held before, and the least recently used when there are too many. */
  private async makeRoom(path: string): Promise<void> {
    const idle = this.attached.filter((a) => a.users === 0).sort((a, b) => a.usedAt - b.usedAt);
    const surplus = Math.max(0, this.attached.length + 1 - MOST_ATTACHED);
    const closing = new Set([...idle.filter((a) => a.path === path), ...idle.slice(0, surplus)]);
    for (const { alias } of closing) await this.withConnection((c) => c.run(`DETACH ${alias}`));
    this.attached = this.attached.filter((a) => !closing.has(a));
  }
}

const readers = new WeakMap<Deps, ScanReader>();

/** The reader of this process. */
export const readerOf = (deps: Deps): ScanReader => {
  const reader = readers.get(deps) ?? new ScanReader(deps);
  readers.set(deps, reader);
  return reader;
};

/** All numbers of the first column, without an object for each row. */
export const readIds = async (result: DuckDBResult, most: number): Promise<BigInt64Array> => {
  const ids = new BigInt64Array(most);
  let length = 0;
  for (;;) {
    const chunk = await result.fetchChunk();
    if (!chunk || chunk.rowCount === 0) return length === most ? ids : ids.slice(0, length);
    const { items } = chunk.getColumnVector(0) as unknown as { items: BigInt64Array };
    const room = items.subarray(0, Math.min(chunk.rowCount, most - length));
    ids.set(room, length);
    length += room.length;
  }
};
