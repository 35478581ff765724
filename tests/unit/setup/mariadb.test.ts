import { mkdtempSync, readFileSync, rmSync, statSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createConnection } from "mysql2/promise";
import { afterEach, beforeEach, expect, test } from "vitest";
import { DATABASE, type MariaDb, startMariaDb } from "#scripts/lib/mariadb.ts";
import { socketPath } from "#scripts/lib/mariadb-folder.ts";
import { commandOf } from "#scripts/lib/processes.ts";

let folder: string;
const running: MariaDb[] = [];

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "shortlight-mariadb-"));
});
afterEach(async () => {
  for (const server of running.splice(0)) await server.stop();
  rmSync(folder, { recursive: true, force: true });
});

const start = async (): Promise<MariaDb> => {
  const server = await startMariaDb({ folder });
  running.push(server);
  return server;
};

const query = async (server: MariaDb, sql: string): Promise<unknown> => {
  const connection = await createConnection({ uri: server.url(DATABASE).replace(/^mariadb:/, "mysql:") });
  try {
    const [rows] = await connection.query(sql);
    return rows;
  } finally {
    await connection.end();
  }
};

test("an orphan is taken over, and after a crash data, port and password are as before", {
  timeout: 120_000,
}, async () => {
  const first = await start();
  await query(first, "CREATE TABLE star (id INT PRIMARY KEY)");
  await query(first, "INSERT INTO star VALUES (7)");

  const again = await start();
  expect(again.pid).toBe(first.pid);

  process.kill(first.pid, "SIGKILL");
  await expect.poll(() => commandOf(first.pid)).toBeNull();
  const second = await start();
  expect(second.pid).not.toBe(first.pid);
  expect(second.url(DATABASE)).toBe(first.url(DATABASE));
  expect(await query(second, "SELECT id FROM star")).toEqual([{ id: 7 }]);

  await second.stop();
  expect(commandOf(second.pid)).toBeNull();
  expect(statSync(join(folder, "password")).mode & 0o077).toBe(0);
  expect(readFileSync(join(folder, "mariadb.log"), "utf8")).toContain("Shutdown complete");
});

test("text is utf8mb4, times are UTC, and the user can do nothing outside its database", {
  timeout: 120_000,
}, async () => {
  const server = await start();
  const [row] = (await query(
    server,
    "SELECT @@character_set_database AS charset, @@time_zone AS zone, @@local_infile AS reads_local",
  )) as object[];
  expect(row).toEqual({ charset: "utf8mb4", zone: "+00:00", reads_local: 1 });
  await expect(query(server, "CREATE DATABASE another")).rejects.toThrow(/denied/);
  await expect(query(server, "SELECT * FROM mysql.global_priv")).rejects.toThrow(/denied/);
});

test("the socket's path fits into what the system allows, however deep the folder lies", () => {
  expect(socketPath("/srv/shortlight/var/mariadb")).toBe("/srv/shortlight/var/mariadb/mariadb.sock");
  expect(Buffer.byteLength(socketPath(`/${"deep/".repeat(40)}`))).toBeLessThanOrEqual(107);
});
