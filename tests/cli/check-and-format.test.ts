import { chmodSync, mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { divider, shell } from "./shell";

const SOUND = divider("");
const WRONG = SOUND.replace("highest(out)", "highest(outt)");

describe("sweepwright check", () => {
  test("says that a netlist is sound", async () => {
    const { code, out, err } = await shell(["check", "-"], { input: SOUND });
    expect({ code, err }).toEqual({ code: 0, err: "" });
    expect(out).toBe("-: sound, 11 points to solve, 3 unknowns each\n");
  });

  test("underlines what is wrong and leaves with 3", async () => {
    const { code, out } = await shell(["check", "-"], { input: WRONG });
    expect(code).toBe(3);
    expect(out).toContain("-:10:20: error NAM3: Nothing here is called `outt`; did you mean `out`?");
    expect(out).toContain(
      "\n  10 | read top = highest(outt)\n     |                    ^^^^  Change to out\n",
    );
    expect(out).toContain("-: 1 error\n");
  });

  test("lists the same by line and as JSON", async () => {
    const lines = await shell(["check", "--annotations", "-"], { input: WRONG });
    expect(lines.out).toMatch(/^-:10:20: error NAM3: [^\n]+\n$/u);
    const json = await shell(["check", "--json", "-"], { input: WRONG });
    expect(JSON.parse(json.out)).toMatchObject({
      file: "-",
      diagnostics: [{ code: "NAM3", line: 10, column: 20, fix: { text: "out" } }],
    });
  });
});

describe("sweepwright format", () => {
  const untidy = SOUND.replace("knob V_in = 1 V", "knob   V_in=1V").replace("1 kΩ", "1 kohm");

  test("prints the canonical form", async () => {
    expect(await shell(["format", "-"], { input: untidy })).toEqual({ code: 0, out: SOUND, err: "" });
  });

  test("lists and rewrites files that are not in it", async () => {
    const folder = mkdtempSync(join(tmpdir(), "sweepwright-"));
    writeFileSync(join(folder, "tidy.swn"), SOUND);
    writeFileSync(join(folder, "untidy.swn"), untidy);
    const files = ["tidy.swn", "untidy.swn"];
    const checked = await shell(["format", "--check", ...files], { folder });
    expect(checked).toEqual({ code: 1, out: "untidy.swn\n", err: "" });
    const written = await shell(["format", "--write", ...files], { folder });
    expect(written).toEqual({ code: 0, out: "untidy.swn\n", err: "" });
    expect(readFileSync(join(folder, "untidy.swn"), "utf8")).toBe(SOUND);
    expect(await shell(["format", "--check", ...files], { folder })).toEqual({ code: 0, out: "", err: "" });
  });
});

describe("what is not understood", () => {
  test.each([
    [[], "A command is wanted."],
    [["solve", "a.swn"], "solve is no command; the commands are check, run, format."],
    [["run"], "No FILE is given."],
    [["run", "--jsn", "-"], "Did you mean --json?"],
    [["run", "--json", "--json", "-"], "--json is given twice."],
    [["run", "--json=yes", "-"], "--json takes no value."],
    [["run", "-", "--threads"], "--threads wants N after it."],
    [["run", "--threads", "0", "-"], "--threads wants a whole number from 1 on, not 0."],
    [["run", "--json", "--annotations", "-"], "--json and --annotations exclude each other."],
    [["check", "nowhere.swn"], "nowhere.swn is not there"],
    [["check", "tests"], "tests is a folder"],
    [["check", "-", "-"], "give `-` once"],
    [["format", "--write", "-"], "Standard input cannot be rewritten."],
    [["format", "a.swn", "b.swn"], "add --check or --write"],
  ])("%j leaves with 2 and says why", async (words, reason) => {
    const { code, out, err } = await shell(words);
    expect({ code, out }).toEqual({ code: 2, out: "" });
    expect(err).toContain(reason);
  });

  test("text that is not UTF-8 is a netlist error", async () => {
    const { code, err } = await shell(["check", "-"], { input: Uint8Array.of(0x6b, 0xff, 0x6e) });
    expect(code).toBe(3);
    expect(err).toContain("not text in UTF-8");
  });

  test.skipIf(process.getuid?.() === 0)("a file that may not be read leaves with 4", async () => {
    const folder = mkdtempSync(join(tmpdir(), "sweepwright-"));
    writeFileSync(join(folder, "closed.swn"), SOUND);
    chmodSync(join(folder, "closed.swn"), 0);
    expect(await shell(["check", "closed.swn"], { folder })).toMatchObject({ code: 4 });
  });

  test("help is data, of the program and of each command", async () => {
    for (const words of [["--help"], ["check", "--help"], ["run", "-h"], ["format", "--help"]]) {
      const { code, out, err } = await shell(words);
      expect({ code, err }).toEqual({ code: 0, err: "" });
      expect(out).toContain("FILE…");
    }
    expect((await shell(["run", "--help"])).out).toMatch(/--threads N +threads to solve on/u);
  });
});
