import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { arePackagesCurrent, isNodeNewEnough } from "#scripts/lib/bootstrap.mjs";

test.each([
  ["v18.20.4", false],
  ["v20.18.3", false],
  ["v20.19.0", true],
  ["v20.20.2", true],
  ["v21.7.3", false],
  ["v22.11.0", false],
  ["v22.12.0", true],
  ["v24.0.0", true],
])("Node %s is new enough: %s", (version, expected) => {
  expect(isNodeNewEnough(version)).toBe(expected);
});

describe("whether the packages are current", () => {
  let root: string;
  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), "shortlight-packages-"));
    write("package-lock.json", {
      "": { version: "0.1.0" },
      "node_modules/a": { version: "1.0.0" },
      "node_modules/b-for-another-machine": { version: "2.0.0", optional: true },
    });
  });
  afterEach(() => rmSync(root, { recursive: true }));

  const write = (file: string, packages: Record<string, object>): void => {
    mkdirSync(join(root, "node_modules"), { recursive: true });
    writeFileSync(join(root, file), JSON.stringify({ packages }));
  };
  const INSTALLED = "node_modules/.package-lock.json";

  test("nothing installed is not current", () => {
    expect(arePackagesCurrent(root)).toBe(false);
  });

  test("what the lock file asks for is current, also without packages for other machines", () => {
    write(INSTALLED, { "node_modules/a": { version: "1.0.0" } });
    expect(arePackagesCurrent(root)).toBe(true);
  });

  test("another version, also of an optional package, is stale", () => {
    write(INSTALLED, { "node_modules/a": { version: "1.0.1" } });
    expect(arePackagesCurrent(root)).toBe(false);
    write(INSTALLED, {
      "node_modules/a": { version: "1.0.0" },
      "node_modules/b-for-another-machine": { version: "1.9.0" },
    });
    expect(arePackagesCurrent(root)).toBe(false);
  });

  test("a missing package is stale", () => {
    write(INSTALLED, {});
    expect(arePackagesCurrent(root)).toBe(false);
  });
});
