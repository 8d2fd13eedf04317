import { describe, expect, it } from "vitest";
import { Complaint, explain, fullDisk } from "@/lib/stack/complaint";
import { ensureTools } from "@/lib/stack/debian";
import { chosenParts, PARTS } from "@/lib/stack/options";
import { requireSpace } from "@/lib/stack/space";

const missing = { name: "PostgreSQL", package: "postgresql", present: () => false };
const also = { name: "Chromium", package: "chromium", present: () => false };

function systemError(code: string, path?: string): Error {
  return Object.assign(new Error(`${code}: something low down`), {
    code,
    ...(path === undefined ? {} : { path }),
  });
}

describe("what the person at the terminal is told", () => {
  it("is the sentence alone when they can mend it", () => {
    expect(explain(new Complaint("Do this."))).toBe("Do this.");
    expect(explain(systemError("ENOSPC", "data/x"))).toBe(
      "The disk is full (data/x). Free some space and start again.",
    );
    expect(explain(systemError("EACCES", "data/x"))).toMatch(
      /^This user may not write there \(data\/x\)\. .*SWEEPWRIGHT_DATA/,
    );
  });

  it("is the whole error when the fault is ours", () => {
    expect(explain(new TypeError("undefined is not a function"))).toMatch(/TypeError[\s\S]*\n\s+at /);
    expect(explain(systemError("EWHATEVER"))).toMatch(/\n\s+at /);
  });

  it("finds a full disk in what a program wrote", () => {
    expect(fullDisk("could not extend file: No space left on device", "data")).toMatch(
      /^The disk is full \(data\)/,
    );
    expect(fullDisk("npm error code ENOSPC", "data")).toMatch(/^The disk is full/);
    expect(fullDisk("everything else", "data")).toBeNull();
  });

  it("warns of a nearly full disk before anything is half made", () => {
    expect(() => requireSpace("data", 300, 300 * 2 ** 20)).not.toThrow();
    expect(() => requireSpace("data", 300, 20.5 * 2 ** 20)).toThrow(
      "The disk of data is nearly full: 20 MiB are free and Sweepwright needs 300 MiB. Free some space and start again.",
    );
  });
});

describe("a missing program", () => {
  it("is named with the command that installs it, for an ordinary user", async () => {
    await expect(ensureTools([missing], false, true)).rejects.toThrow(
      "PostgreSQL is missing. Install it with:\n  sudo apt-get install --no-install-recommends postgresql\nand start again.",
    );
    await expect(ensureTools([missing, also], false, true)).rejects.toThrow(
      /PostgreSQL and Chromium are missing\. Install them with:\n {2}sudo apt-get .* postgresql chromium\n/,
    );
  });

  it("is named without a command where there is no apt", async () => {
    await expect(ensureTools([missing], true, false)).rejects.toThrow(
      /^PostgreSQL is missing\. Install it with your system/,
    );
  });

  it("is no matter when it is there", async () => {
    await expect(ensureTools([{ ...missing, present: () => true }], false, false)).resolves.toBeUndefined();
  });
});

describe("the words after npm test", () => {
  it("choose the parts, in the order of the checks", () => {
    expect(chosenParts([])).toEqual(PARTS);
    expect(chosenParts(["--only", "e2e,unit"])).toEqual(["unit", "e2e"]);
    expect(chosenParts(["--only=integration"])).toEqual(["integration"]);
  });

  it.each([["--only"], ["--only", "unit,nothing"], ["unit"], ["--only", "unit", "e2e"]])(
    "refuse %s %s %s",
    (...words) => {
      expect(() => chosenParts(words.filter((word) => word !== undefined))).toThrow(
        /is not understood\. Say: npm test -- --only/,
      );
    },
  );
});
