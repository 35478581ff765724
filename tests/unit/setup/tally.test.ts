import { expect, test } from "vitest";
import { addTally, tallyLine } from "#scripts/lib/tally.ts";

test("the closing line counts everything, and mentions skipped tests only when there are any", () => {
  const some = addTally({ passed: 3, failed: 1, skipped: 0 }, { passed: 10, failed: 0, skipped: 0 });
  expect(tallyLine(some)).toBe("13 passed, 1 failed");
  expect(tallyLine(addTally(some, { passed: 0, failed: 0, skipped: 2 }))).toBe(
    "13 passed, 1 failed, 2 skipped",
  );
});
