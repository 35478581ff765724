import { expect, test } from "vitest";
import { ownFolder, run } from "./support.ts";

const { folder } = ownFolder();

test.each([
  [["--help"], /shortlight derive FILE[\s\S]*shortlight precision/],
  [["help"], /Exit codes/],
  [["derive", "--help"], /--card[\s\S]*--plan[\s\S]*"columns"/],
  [["derive", "x.csv", "-h"], /--recipe/],
  [["explain", "--help"], /--quantity[\s\S]*--json/],
  [["precision", "--help"], /--photons-only/],
  [["read", "--help"], /--companion[\s\S]*--rows/],
])("%j explains itself on the standard output", async (args, words) => {
  const { code, out, err } = await run(folder, ...args);
  expect([code, err]).toEqual([0, ""]);
  expect(out).toMatch(words);
  for (const line of out.split("\n")) expect(line.length).toBeLessThanOrEqual(120);
});

test.each([[[]], [["toString"]], [["derived"]], [["--card"]]])("%j is no command", async (args) => {
  const { code, out, err } = await run(folder, ...args);
  expect([code, out]).toEqual([2, ""]);
  expect(err).toMatch(/`shortlight --help` lists the commands\./);
});
