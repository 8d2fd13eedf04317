import { mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import type { RunDocument } from "@/lib/analyses/result";
import { divider, shell } from "./shell";

const HOLDS = divider('require top <= 1.1 V as "ceiling"');
const BREAKS = divider('require top <= 0.9 V as "low <ceiling> & more"');

function folderWith(files: Readonly<Record<string, string>>): string {
  const folder = mkdtempSync(join(tmpdir(), "sweepwright-"));
  for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text);
  return folder;
}

const documentsOf = (out: string): RunDocument[] =>
  out
    .trimEnd()
    .split("\n")
    .map((line) => JSON.parse(line));

// Threads that read TypeScript take a second to start.
describe("sweepwright run", { timeout: 60_000 }, () => {
  test("prints a run document a line, one a file, and leaves by the gravest of them", async () => {
    const folder = folderWith({ "a.swn": HOLDS, "b.swn": BREAKS });
    const { code, out, err } = await shell(["run", "--json", "--quiet", "a.swn", "b.swn"], { folder });
    expect(err).toBe("");
    const documents = documentsOf(out);
    expect(documents.map(({ format, title, verdict }) => [format, title, verdict])).toEqual([
      ["sweepwright-run/1", "Divider", "holds"],
      ["sweepwright-run/1", "Divider", "broken"],
    ]);
    // Equal resistors halve the voltage.
    expect(documents[0]!.traces[0]!.values.at(-1)).toBeCloseTo(1, 12);
    expect(documents[1]!.requirements[0]!.margin).toBeCloseTo(-0.1, 12);
    expect(code).toBe(1);
  });

  test("prints the same bytes for any number of threads", async () => {
    const words = ["run", "--json", "--quiet", "examples/current-mirrors.swn"];
    const answers = await Promise.all(
      ["1", "2", "5"].map((threads) => shell([...words, "--threads", threads])),
    );
    expect(documentsOf(answers[0]!.out)[0]!.points.outcome.length).toBeGreaterThan(1000);
    expect(new Set(answers.map(({ out }) => out)).size).toBe(1);
  });

  test("solves and proves a circuit far larger than the service takes", async () => {
    const sections = Array.from(
      { length: 1500 },
      (_, k) => `n${k} -- R${k} : resistor 10 Ω -- n${k + 1} -- D${k} : d -- ground\n`,
    );
    const input = `model d : diode { Is = 1 pA }\nground -- V1 : voltage 5 V -- n0\n${sections.join("")}show n1500.v, n1.v\n`;
    const { code, out } = await shell(["run", "--json", "--quiet", "-"], { input });
    expect(code).toBe(0);
    const { points, traces, diagnostics } = documentsOf(out)[0]!;
    expect(diagnostics).toEqual([]);
    expect(points.bound[0]).toBeLessThanOrEqual(10e-12);
    expect(traces[0]!.values[0]).toBeLessThan(traces[1]!.values[0]!);
  });

  test("leaves with 3 and a document without data where a netlist has errors", async () => {
    const input = HOLDS.replace("resistor 1 kΩ -- out", "resistor 1 kV -- out");
    const { code, out } = await shell(["run", "--json", "-"], { input });
    expect(code).toBe(3);
    const [document] = documentsOf(out);
    expect(document).toMatchObject({ verdict: "no data", traces: [], diagnostics: [{ line: 5 }] });
  });

  test("tells a person the verdict, the traces and the margins", async () => {
    const { code, out, err } = await shell(["run", "-"], { input: BREAKS });
    expect(code).toBe(1);
    expect(out).toContain("broken: 11 points solved");
    expect(out).toMatch(/out\s+500\.0\smV\s+1\.000\sV/u);
    expect(out).toMatch(/low <ceiling> & more\s+broken\s+−100\.0\smV/u);
    expect(out).not.toContain("\u001b[");
    expect(err).toMatch(/^-: 11 points in/u);
  });

  test("calls nothing held where nothing is required, and leaves with 1 where points failed", async () => {
    const solved = await shell(["run", "--quiet", "-"], { input: divider("") });
    expect([solved.code, solved.out.includes("nothing is required: 11 points solved")]).toEqual([0, true]);
    const { code, out } = await shell(["run", "--quiet", "examples/reversed-input.swn"]);
    expect(code).toBe(1);
    expect(out).toMatch(/nothing is required: 41 of 51 points solved, .* each of these proved/);
    expect(out).toMatch(/not solved at V_in = −500\smV: came to a stand; unsettled: /u);
  });

  test("tells what costs a requirement the most, also one that need not hold in every draw", async () => {
    const input = divider('require out within 0.5 V ± 1 % at V_in = 1 V in 90 % of draws as "half"')
      .replace("R1 : resistor 1 kΩ", "R1 : resistor 1 kΩ ± 1 %")
      .replace("R2 : resistor 1 kΩ", "R2 : resistor 1 kΩ ± 2 %")
      .replace("show", "draws 10 seed 1\nshow");
    const { out } = await shell(["run", "--quiet", "-"], { input });
    // Both resistors move the half alike, so their shares go with the squares of their tolerances, 4 to 1.
    expect(out).toMatch(/\nbudget .*\n(.*\n)?half .* R2 80 %, R1 20 %\n/u);
  });

  test("tells all operating points where the text asks for them", async () => {
    const { out, code } = await shell(["run", "--quiet", "examples/schmitt-trigger.swn"]);
    expect(code).toBe(0);
    expect(out).toMatch(/\n1 +1\sV to 2\.4\sV +stable /u);
    expect(out).toMatch(/\n3 +1\.4\sV to 2\.4\sV +unstable /u);
    expect(out).toMatch(/\nfold at 2\.411/u);
  });

  test("draws and colours on a terminal alone, and leaves colour out where NO_COLOR says so", async () => {
    const shown = await shell(["run", "-"], { input: HOLDS, terminal: true });
    expect(shown.out).toContain("▁▂");
    expect(shown.out).toContain("\u001b[32mholds");
    const plain = await shell(["run", "-"], { input: HOLDS, terminal: true, environment: { NO_COLOR: "1" } });
    expect(plain.out).toContain("▁▂");
    expect(plain.out).not.toContain("\u001b[");
  });

  test("annotates a broken requirement at its line, and says nothing of what holds", async () => {
    const folder = folderWith({ "a.swn": HOLDS, "b.swn": BREAKS });
    const { out } = await shell(["run", "--annotations", "--quiet", "a.swn", "b.swn"], { folder });
    expect(out).toBe("b.swn:11:1: error requirement: low <ceiling> & more: broken by 100.0 mV.\n");
  });

  test("writes a report with a case a requirement, and the document to a file", async () => {
    const folder = folderWith({ "a.swn": HOLDS, "b.swn": BREAKS });
    const words = ["run", "--quiet", "--json", "--output", "out.json", "--junit", "report.xml"];
    const { out } = await shell([...words, "a.swn", "b.swn"], { folder });
    expect(out).toBe("");
    expect(documentsOf(readFileSync(join(folder, "out.json"), "utf8"))).toHaveLength(2);
    const report = readFileSync(join(folder, "report.xml"), "utf8");
    expect(report).toContain('<testsuites name="sweepwright" tests="4" failures="1" errors="0">');
    expect(report).toContain("low &lt;ceiling&gt; &amp; more");
  });

  test("gives up when its time is over", async () => {
    const input = HOLDS.replace("11 points", "10001 points");
    const { code, err } = await shell(["run", "--quiet", "--timeout", "1", "-"], {
      input: input
        .replace("sweep V_in", "knob other = 1 V\nsweep V_in")
        .replace("show", "sweep other from 1 V to 2 V, 90 points\nshow"),
    });
    expect(code).toBe(5);
    expect(err).toContain("The time of 1 s was up");
  });

  test("brings in a file beside the netlist, and nothing from elsewhere", async () => {
    const half =
      "block half(in, out) {\n  in -- R1 : resistor 1 kΩ -- out -- R2 : resistor 1 kΩ -- ground\n}\n";
    const user = [
      'use "halves"',
      "ground -- V1 : voltage 3 V -- a",
      "H : half { in = a, out = out }",
      "show out.v",
      'require out.v within 1.5 V ± 1 nV as "half"',
      "",
    ].join("\n");
    const folder = folderWith({
      "halves.swn": half,
      "user.swn": user,
      "away.swn": user.replace("halves", "../halves"),
    });
    const inside = await shell(["run", "--json", "--quiet", "user.swn"], { folder });
    expect(documentsOf(inside.out)[0]).toMatchObject({ verdict: "holds", diagnostics: [] });
    const outside = await shell(["run", "--quiet", "away.swn"], { folder });
    expect(outside.code).toBe(3);
    expect(outside.err).toContain("../halves");
  });

  test("leaves with 130 where it is interrupted", async () => {
    const { code, out } = await shell(["run", "-"], { input: HOLDS, signal: AbortSignal.abort() });
    expect({ code, out }).toEqual({ code: 130, out: "" });
  });
});
