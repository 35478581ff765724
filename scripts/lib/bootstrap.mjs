// Runs before anything is installed and on any Node: plain JavaScript, no packages, no new syntax.
import { spawn } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const ROOT = join(dirname(fileURLToPath(import.meta.url)), "../..");

const say = (text) => process.stderr.write(`${text}\n`);

/** The same range as `engines` in package.json: 20.19 and later 20s, 22.12 and everything later. */
export const isNodeNewEnough = (version) => {
  const [major, minor] = version.replace(/^v/, "").split(".").map(Number);
  if (major === 20) return minor >= 19;
  return major > 22 || (major === 22 && minor >= 12);
};

/**
 * Whether what npm says it installed is what the lock file asks for. npm writes its own list last, so an
 * installation that was cut off has none. Packages for other machines may be missing.
 */
export const arePackagesCurrent = (root) => {
  const installed = join(root, "node_modules/.package-lock.json");
  if (!existsSync(installed)) return false;
  const read = (file) => JSON.parse(readFileSync(file, "utf8")).packages || {};
  const wanted = read(join(root, "package-lock.json"));
  const present = read(installed);
  return Object.keys(wanted).every((path) => {
    if (path === "") return true;
    const isThere = present[path] && present[path].version === wanted[path].version;
    return isThere || (!present[path] && wanted[path].optional === true);
  });
};

const run = (command, args) =>
  new Promise((resolve) => {
    const child = spawn(command, args, { cwd: ROOT, stdio: ["ignore", "inherit", "inherit"] });
    child.on("error", () => resolve(127));
    child.on("close", (code) => resolve(code === null ? 1 : code));
  });

const installPackages = async () => {
  say("Installing the npm packages (first run, or package-lock.json has changed) ...");
  const npm = process.env.npm_execpath;
  const args = ["ci", "--include=dev", "--no-audit", "--no-fund"];
  const code = npm ? await run(process.execPath, [npm].concat(args)) : await run("npm", args);
  if (code === 0) return true;
  say(
    `The npm packages could not be installed: npm ended with code ${code}. Its message is above; run the command again when that is put right.`,
  );
  return false;
};

/** Checks Node, installs the packages, then runs that TypeScript file in this process. */
export const handOverTo = async (script) => {
  if (!isNodeNewEnough(process.version)) {
    say(
      `Shortlight needs Node.js 20.19 or a later 20, or 22.12 or later; this is ${process.version}. Install one of those and run the command again.`,
    );
    process.exit(1);
  }
  process.chdir(ROOT);
  if (!arePackagesCurrent(ROOT) && !(await installPackages())) process.exit(1);
  process.env.TSX_TSCONFIG_PATH = join(ROOT, "server/tsconfig.json");
  const tsx = await import(pathToFileURL(join(ROOT, "node_modules/tsx/dist/esm/api/index.mjs")).href);
  tsx.register();
  await import(pathToFileURL(join(ROOT, script)).href);
};
