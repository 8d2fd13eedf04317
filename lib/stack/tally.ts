import { readFileSync } from "node:fs";

/** How many checks of a phase passed, failed and were left out. */
export interface Tally {
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
}

/** The part of vitest's JSON report that is read here. */
interface Report {
  readonly numPassedTests: number;
  readonly numFailedTests: number;
  readonly numPendingTests: number;
  readonly numTodoTests: number;
  readonly testResults: readonly { readonly status: string; readonly assertionResults: readonly unknown[] }[];
}

export const NOTHING: Tally = { passed: 0, failed: 0, skipped: 0 };

export function sum(tallies: readonly Tally[]): Tally {
  return tallies.reduce(
    (all, one) => ({
      passed: all.passed + one.passed,
      failed: all.failed + one.failed,
      skipped: all.skipped + one.skipped,
    }),
    NOTHING,
  );
}

/** A single check, such as the types of the whole tree. */
export function single(passed: boolean): Tally {
  return { passed: passed ? 1 : 0, failed: passed ? 0 : 1, skipped: 0 };
}

/** The line that `npm test` ends with. */
export function closingLine(tally: Tally): string {
  return `${tally.passed} passed, ${tally.failed} failed, ${tally.skipped} skipped`;
}

/**
 * Counts a vitest report. A file that could not be loaded has no tests in the report and counts as one failure, and so does a
 * run that ended badly (`exitCode` ≠ 0) without a failed test, or that left no report at all.
 */
export function countReport(file: string, exitCode: number): Tally {
  const report = read(file);
  if (report === null) return single(false);
  const broken = report.testResults.filter(
    (f) => f.status === "failed" && f.assertionResults.length === 0,
  ).length;
  const failed = report.numFailedTests + broken;
  return {
    passed: report.numPassedTests,
    failed: failed === 0 && exitCode !== 0 ? 1 : failed,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}

function read(file: string): Report | null {
  try {
    return JSON.parse(readFileSync(file, "utf8")) as Report;
  } catch {
    return null;
  }
}
