import { spawnSync } from "node:child_process";
import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";
import { Trouble } from "./trouble.ts";

/** Servers are often left out of the search path of ordinary users. */
const FOLDERS = () => [
  ...(process.env.PATH ?? "").split(delimiter),
  "/usr/sbin",
  "/usr/local/sbin",
  "/usr/bin",
  "/usr/local/bin",
  "/usr/libexec",
];

const findProgram = (...names: string[]): string | null => {
  for (const name of names)
    for (const folder of FOLDERS()) {
      const path = join(folder, name);
      try {
        accessSync(path, constants.X_OK);
        return path;
      } catch {
        // Look further.
      }
    }
  return null;
};

interface Need {
  /** What the product needs it for, continuing "needs … to". */
  what: string;
  programs: string[];
  packages: string[];
  otherwise: string;
}

const apt = (args: string[]): number => {
  const done = spawnSync("apt-get", ["-q", "-o", "DPkg::Lock::Timeout=600", ...args], {
    stdio: ["ignore", "pipe", "pipe"],
    encoding: "utf8",
    env: { ...process.env, DEBIAN_FRONTEND: "noninteractive", LC_ALL: "C.UTF-8" },
  });
  if (done.status !== 0) process.stderr.write((done.stderr ?? "").split("\n").slice(-8).join("\n"));
  return done.status ?? 1;
};

/** The program, installed from Debian's packages when it is missing and this is root; else a clear refusal. */
const requireProgram = (need: Need): string => {
  const found = findProgram(...need.programs);
  if (found) return found;
  const command = `apt-get install --no-install-recommends ${need.packages.join(" ")}`;
  const sentence = `${need.what} is not installed; install it as root with \`${command}\`${need.otherwise}.`;
  if (process.getuid?.() !== 0 || findProgram("apt-get") === null) throw new Trouble(sentence);
  process.stderr.write(`Installing ${need.what} from Debian's packages ...\n`);
  apt(["update"]);
  const code = apt(["install", "-y", "--no-install-recommends", ...need.packages]);
  const installed = findProgram(...need.programs);
  if (code !== 0 || !installed)
    throw new Trouble(`${need.what} could not be installed: apt-get ended with code ${code}. ${sentence}`);
  return installed;
};

export interface MariaDbPrograms {
  server: string;
  install: string;
}

/** Debian's core packages have the server without the system service, so nothing is started behind our back. */
export const requireMariaDb = (): MariaDbPrograms => {
  const need = {
    what: "MariaDB",
    packages: ["mariadb-server-core", "mariadb-client-core"],
    otherwise: ", or set DATABASE_URL to a MariaDB that is run elsewhere",
  };
  return {
    server: requireProgram({ ...need, programs: ["mariadbd", "mysqld"] }),
    install: requireProgram({ ...need, programs: ["mariadb-install-db", "mysql_install_db"] }),
  };
};

export const findChromium = (): string | null => findProgram("chromium", "chromium-browser", "google-chrome");

/** The browser that the browser tests drive. */
export const requireChromium = (): string =>
  requireProgram({
    what: "Chromium",
    programs: ["chromium", "chromium-browser", "google-chrome"],
    packages: ["chromium", "fonts-liberation"],
    otherwise: "",
  });
