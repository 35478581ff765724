import { spawn } from "node:child_process";
import { createHash } from "node:crypto";
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { ROOT } from "./root.ts";
import { Trouble } from "./trouble.ts";

/** What the built client is made of. */
const SOURCES = [
  "src",
  "shared",
  "index.html",
  "public",
  "vite.config.ts",
  "tailwind.config.ts",
  "tsconfig.base.json",
  "package-lock.json",
];
const MARK = "built-from.txt";

const filesUnder = (path: string): string[] => {
  if (!existsSync(join(ROOT, path))) return [];
  if (statSync(join(ROOT, path)).isFile()) return [path];
  return readdirSync(join(ROOT, path), { recursive: true, encoding: "utf8" })
    .map((name) => join(path, name))
    .filter((name) => statSync(join(ROOT, name)).isFile())
    .sort();
};

/** A mark of the sources' contents: times of change say little after a checkout. */
const sourceMark = (): string => {
  const hash = createHash("sha256");
  for (const file of SOURCES.flatMap(filesUnder))
    hash.update(`${file}\0`).update(readFileSync(join(ROOT, file)));
  return hash.digest("hex");
};

const readMark = (): string => {
  const file = join(ROOT, "dist", MARK);
  return existsSync(file) ? readFileSync(file, "utf8") : "";
};

/** Builds the client when its sources have changed since. Built aside and swapped in, as it may be in use. */
export const buildClient = async (): Promise<void> => {
  const mark = sourceMark();
  if (readMark() === mark) return;
  process.stderr.write("Building the pages ...\n");
  const aside = join(ROOT, "var", `build-${process.pid}`);
  mkdirSync(aside, { recursive: true });
  try {
    await vite(aside);
    writeFileSync(join(aside, MARK), mark);
    const old = `${aside}-old`;
    if (existsSync(join(ROOT, "dist"))) renameSync(join(ROOT, "dist"), old);
    renameSync(aside, join(ROOT, "dist"));
    rmSync(old, { recursive: true, force: true });
  } finally {
    rmSync(aside, { recursive: true, force: true });
  }
};

const vite = (outDir: string): Promise<void> =>
  new Promise((resolve, reject) => {
    const args = [
      "node_modules/vite/bin/vite.js",
      "build",
      "--outDir",
      outDir,
      "--emptyOutDir",
      "--logLevel",
      "warn",
    ];
    const child = spawn(process.execPath, args, {
      cwd: ROOT,
      env: { ...process.env, NO_COLOR: "1" },
      stdio: ["ignore", "pipe", "pipe"],
    });
    let said = "";
    const listen = (chunk: Buffer) => {
      said = (said + chunk).slice(-4000);
    };
    child.stdout.on("data", listen);
    child.stderr.on("data", listen);
    child.once("error", reject);
    child.once("close", (code) => {
      if (code === 0) resolve();
      else reject(new Trouble(`The pages could not be built:\n${said.trim()}`));
    });
  });
