import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, renameSync, rmSync } from "node:fs";
import { tmpdir, userInfo } from "node:os";
import { dirname, join } from "node:path";
import { Trouble } from "./trouble.ts";

/** A socket's path has to fit into 108 bytes with its ending zero. */
const SOCKET_BYTES = 107;

export const socketPath = (folder: string): string => {
  const inside = join(folder, "mariadb.sock");
  if (Buffer.byteLength(inside) <= SOCKET_BYTES) return inside;
  const mark = createHash("sha256").update(folder).digest("hex").slice(0, 16);
  return join(tmpdir(), `shortlight-${mark}.sock`);
};

/** MariaDB runs as root only when told so in words; files of another user would lie where it cannot reach. */
export const userArguments = (): string[] => (process.getuid?.() === 0 ? ["--user=root"] : []);

/** Makes the system tables, once. Written aside and renamed, so that a half-made folder is never used. */
export const initialise = (program: string, data: string): void => {
  if (existsSync(join(data, "mysql"))) return;
  const aside = `${data}.new`;
  rmSync(aside, { recursive: true, force: true });
  mkdirSync(dirname(data), { recursive: true, mode: 0o700 });
  const done = spawnSync(
    program,
    [
      "--no-defaults",
      `--datadir=${aside}`,
      "--auth-root-authentication-method=socket",
      `--auth-root-socket-user=${userInfo().username}`,
      "--skip-test-db",
      "--skip-name-resolve",
      ...userArguments(),
    ],
    {
      encoding: "utf8",
      stdio: ["ignore", "pipe", "pipe"],
      // In a shared folder two set-ups at the same moment would take each other's temporary tables away.
      env: { ...process.env, TMPDIR: dirname(data) },
    },
  );
  if (done.status !== 0) {
    rmSync(aside, { recursive: true, force: true });
    const said = `${done.stdout ?? ""}\n${done.stderr ?? ""}`
      .split("\n")
      .filter((line) => /error/i.test(line));
    throw new Trouble(
      `The database folder ${data} could not be made. ${said[0] ?? done.error?.message ?? "No reason was given."} Check that the disk has room (about 300 MB) and that the folder may be written.`,
    );
  }
  rmSync(data, { recursive: true, force: true });
  renameSync(aside, data);
};
