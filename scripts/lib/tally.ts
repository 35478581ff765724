export interface Tally {
  passed: number;
  failed: number;
  skipped: number;
}

export const addTally = (a: Tally, b: Tally): Tally => ({
  passed: a.passed + b.passed,
  failed: a.failed + b.failed,
  skipped: a.skipped + b.skipped,
});

/** The plain closing line of a test run. */
export const tallyLine = ({ passed, failed, skipped }: Tally): string =>
  `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ""}`;
