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
  what: string;
  /** Where it is; null when it is missing. */
  find(): string | null;
  packages: string[];
  /** What else a person can do, continuing the sentence that names the command. */
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

/** Where it is, installed from Debian's packages when it is missing and this is root; else a clear refusal. */
const requireInstalled = (need: Need): string => {
  const found = need.find();
  if (found) return found;
  const command = `apt-get install --no-install-recommends ${need.packages.join(" ")}`;
  const sentence = `${need.what} is not installed; install it as root with \`${command}\`${need.otherwise}.`;
  if (process.getuid?.() !== 0 || findProgram("apt-get") === null) throw new Trouble(sentence);
  process.stderr.write(`Installing ${need.what} from Debian's packages ...\n`);
  apt(["update"]);
  const code = apt(["install", "-y", "--no-install-recommends", ...need.packages]);
  const installed = need.find();
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
    server: requireInstalled({ ...need, find: () => findProgram("mariadbd", "mysqld") }),
    install: requireInstalled({ ...need, find: () => findProgram("mariadb-install-db", "mysql_install_db") }),
  };
};

export const findChromium = (): string | null => findProgram("chromium", "chromium-browser", "google-chrome");

/** The browser that the browser tests drive. */
export const requireChromium = (): string =>
  requireInstalled({
    what: "Chromium",
    find: findChromium,
    packages: ["chromium", "fonts-liberation"],
    otherwise: "",
  });

/** Debian's own Python, as another one earlier on the search path does not see Debian's packages. */
const PYTHON = "/usr/bin/python3";
const ASTROPY_MODULES = ["astropy", "astropy_healpix"];

/** The Python that has astropy and astropy_healpix; null when one of the three is missing. */
export const findAstropy = (): string | null => {
  const look = `import sys; from importlib.util import find_spec; sys.exit(None in map(find_spec, sys.argv[1:]))`;
  return spawnSync(PYTHON, ["-E", "-s", "-c", look, ...ASTROPY_MODULES]).status === 0 ? PYTHON : null;
};

/** The library that the reference tests compare with. */
export const requireAstropy = (): string =>
  requireInstalled({
    what: "astropy",
    find: findAstropy,
    packages: ["python3-astropy", "python3-astropy-healpix"],
    otherwise: "",
  });
