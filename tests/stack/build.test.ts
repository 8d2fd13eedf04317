import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { installed } from "@/lib/stack/bootstrap.mjs";
import { isStamped, sourceStamp, writeStamp } from "@/lib/stack/stamp";
import { closingLine, countReport, single, sum } from "@/lib/stack/tally";

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "sweepwright-unit-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function put(path: string, text: string): void {
  mkdirSync(join(folder, path, ".."), { recursive: true });
  writeFileSync(join(folder, path), text);
}

describe("the stamp of the sources", () => {
  beforeEach(() => {
    put("app/page.tsx", "one");
    put("lib/units/unit.ts", "two");
  });

  it("changes with a content, a name and a new file, and with nothing else", () => {
    const before = sourceStamp(folder);
    utimesSync(join(folder, "app/page.tsx"), 1, 1);
    put("tests/some.test.ts", "not built");
    put("lib/stack/start.ts", "not built");
    expect(sourceStamp(folder)).toBe(before);
    const stamps = [before];
    put("app/page.tsx", "other");
    stamps.push(sourceStamp(folder));
    put("app/page.tsx", "one");
    put("app/more.tsx", "");
    stamps.push(sourceStamp(folder));
    rmSync(join(folder, "app/more.tsx"));
    put("app/less.tsx", "");
    stamps.push(sourceStamp(folder));
    expect(new Set(stamps).size).toBe(4);
  });

  it("holds for the build that wrote it", () => {
    const file = join(folder, "built/sources.stamp");
    expect(isStamped(file, "a")).toBe(false);
    writeStamp(file, "a");
    expect(isStamped(file, "a")).toBe(true);
    expect(isStamped(file, "b")).toBe(false);
  });
});

describe("whether the packages are installed", () => {
  const lock = (packages: object) => JSON.stringify({ lockfileVersion: 3, packages });

  it("is told by npm's own record of the last install that ended", () => {
    put("package-lock.json", lock({ "": {}, "node_modules/a": { version: "1.0.0" } }));
    expect(installed(folder)).toBe(false);
    put("node_modules/.package-lock.json", lock({ "node_modules/a": { version: "1.0.0" } }));
    expect(installed(folder)).toBe(true);
    put("package-lock.json", lock({ "": {}, "node_modules/a": { version: "1.0.1" } }));
    expect(installed(folder)).toBe(false);
  });

  it("overlooks packages for other machines, and takes a record cut off for none", () => {
    put("package-lock.json", lock({ "": {}, "node_modules/b": { version: "2.0.0", optional: true } }));
    put("node_modules/.package-lock.json", lock({}));
    expect(installed(folder)).toBe(true);
    put("node_modules/.package-lock.json", '{"packages":');
    expect(installed(folder)).toBe(false);
  });
});

describe("the count of the checks", () => {
  const report = (changes: object) =>
    JSON.stringify({
      numPassedTests: 5,
      numFailedTests: 0,
      numPendingTests: 1,
      numTodoTests: 1,
      testResults: [],
      ...changes,
    });

  it("is read from the report", () => {
    put("report.json", report({}));
    expect(countReport(join(folder, "report.json"), 0)).toEqual({ passed: 5, failed: 0, skipped: 2 });
  });

  it("takes a file that could not be loaded for a failure", () => {
    put("report.json", report({ testResults: [{ status: "failed", assertionResults: [] }] }));
    expect(countReport(join(folder, "report.json"), 1)).toEqual({ passed: 5, failed: 1, skipped: 2 });
  });

  it("takes a bad end without a failed test, and a missing or cut-off report, for a failure", () => {
    put("report.json", report({}));
    expect(countReport(join(folder, "report.json"), 1).failed).toBe(1);
    expect(countReport(join(folder, "none.json"), 0)).toEqual({ passed: 0, failed: 1, skipped: 0 });
    put("cut.json", '{"numPassed');
    expect(countReport(join(folder, "cut.json"), 0).failed).toBe(1);
  });

  it("ends in one line", () => {
    expect(closingLine(sum([single(true), single(false), { passed: 3, failed: 0, skipped: 2 }]))).toBe(
      "4 passed, 1 failed, 2 skipped",
    );
  });
});
