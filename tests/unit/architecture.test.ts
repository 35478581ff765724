import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, posix, relative } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, test } from "vitest";

const ROOT = join(dirname(fileURLToPath(import.meta.url)), "../..");
const TOPS = ["shared", "server", "src", "migrations"] as const;

interface Import {
  from: string;
  to: string;
}

const sourceFiles = (folder: string): string[] =>
  readdirSync(join(ROOT, folder), { recursive: true, encoding: "utf8" })
    .filter((name) => /\.tsx?$/.test(name) && !name.endsWith(".d.ts"))
    .map((name) => posix.join(folder, name.replaceAll("\\", "/")));

/** A project path for an import of ours, or the package's own name. */
const resolve = (from: string, specifier: string): string => {
  if (specifier.startsWith("#")) return specifier.slice(1);
  if (specifier.startsWith(".")) return relative(ROOT, join(ROOT, dirname(from), specifier));
  return specifier;
};

const importsOf = (file: string): Import[] =>
  [...readFileSync(join(ROOT, file), "utf8").matchAll(/(?:from|import)\s*\(?\s*"([^"]+)"/g)].map((match) => ({
    from: file,
    to: resolve(file, match[1] ?? ""),
  }));

const imports = TOPS.flatMap(sourceFiles).flatMap(importsOf);

const under = (path: string, folder: string): boolean => path === folder || path.startsWith(`${folder}/`);

const offenders = (isWrong: (i: Import) => boolean): string[] =>
  imports.filter(isWrong).map((i) => `${i.from} imports ${i.to}`);

/** `server/<subject>` or `src/features/<subject>`. */
const subjectOf = (path: string, folder: string): string | undefined =>
  under(path, folder) && path.slice(folder.length + 1).includes("/")
    ? path.slice(folder.length + 1).split("/")[0]
    : undefined;

describe("imports run one way", () => {
  test("shared imports nothing of the server, the client or Node", () => {
    expect(
      offenders(
        (i) =>
          under(i.from, "shared") &&
          (under(i.to, "server") || under(i.to, "src") || i.to.startsWith("node:")),
      ),
    ).toEqual([]);
  });

  test("science imports nothing outside its folder", () => {
    expect(offenders((i) => under(i.from, "shared/science") && !under(i.to, "shared/science"))).toEqual([]);
  });

  test("client and server do not import each other", () => {
    expect(
      offenders(
        (i) =>
          (under(i.from, "src") && under(i.to, "server")) || (under(i.from, "server") && under(i.to, "src")),
      ),
    ).toEqual([]);
  });

  test("migrations import nothing of ours", () => {
    expect(
      offenders(
        (i) => under(i.from, "migrations") && TOPS.some((top) => top !== "migrations" && under(i.to, top)),
      ),
    ).toEqual([]);
  });

  test("features of the client do not import each other", () => {
    expect(
      offenders((i) => {
        const [from, to] = [subjectOf(i.from, "src/features"), subjectOf(i.to, "src/features")];
        return from !== undefined && to !== undefined && from !== to;
      }),
    ).toEqual([]);
  });

  test("ui knows nothing of the subject", () => {
    expect(
      offenders((i) => under(i.from, "src/ui") && (under(i.to, "src/features") || under(i.to, "src/app"))),
    ).toEqual([]);
  });

  test("routes reach the database through services alone", () => {
    expect(
      offenders((i) => i.from.startsWith("server/") && i.from.endsWith("/routes.ts") && i.to === "typeorm"),
    ).toEqual([]);
  });

  test("pipeline code knows no HTTP", () => {
    const stages = ["server/derive", "server/assess", "server/formats", "server/scan", "server/catalogue"];
    expect(
      offenders(
        (i) =>
          stages.some((stage) => under(i.from, stage)) &&
          !i.from.endsWith("/routes.ts") &&
          (i.to === "express" || under(i.to, "server/http")),
      ),
    ).toEqual([]);
  });
});
