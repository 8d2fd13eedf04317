import { lineStarts, placeOf } from "@/lib/language/span";
import { annotation } from "./annotations";
import { CHECK } from "./commands";
import { type Compiled, compileSource, explain, netlistCase, remarksOf } from "./compiled";
import { EXIT, type ExitCode } from "./exit-codes";
import { junit } from "./junit";
import { type Given, usage } from "./options";
import { Output, writeFileOf } from "./output";
import { readSources } from "./sources";
import { paintFor } from "./style";
import type { World } from "./world";

/** `sweepwright check`. */
export async function check(given: Given, world: World): Promise<ExitCode> {
  const [isJson, isLines] = [given.options.has("json"), given.options.has("annotations")];
  if (isJson && isLines) throw usage("--json and --annotations exclude each other.", CHECK);
  const compiled = (await readSources(given.files, world)).map(compileSource);
  const output = new Output(given, world);
  const paint = paintFor(output, world);
  for (const one of compiled) {
    if (isJson) output.write(`${JSON.stringify(objectOf(one))}\n`);
    else if (isLines) for (const remark of remarksOf(one)) output.write(annotation(remark));
    else {
      output.write(explain(one));
      output.write(paint(one.job === null ? "bad" : "good", `${one.source.name}: ${summary(one)}`));
      output.write("\n");
    }
  }
  output.end();
  const file = given.options.get("junit");
  if (typeof file === "string") writeFileOf(file, junit(compiled.map(suiteOf)), world);
  return compiled.some(({ job }) => job === null) ? EXIT.netlist : EXIT.holds;
}

function objectOf({ source, diagnostics }: Compiled) {
  const starts = lineStarts(source.text);
  return {
    file: source.name,
    diagnostics: diagnostics.map((one) => ({ ...one, ...placeOf(starts, one.from) })),
  };
}

function suiteOf(compiled: Compiled) {
  const { source, job } = compiled;
  return { file: source.name, title: job?.plan.title ?? "", cases: [netlistCase(compiled)] };
}

function summary({ job, diagnostics }: Compiled): string {
  const errors = diagnostics.filter(({ severity }) => severity === "error").length;
  const warnings = diagnostics.length - errors;
  const counted = [counts(errors, "error"), counts(warnings, "warning")].filter((text) => text !== null);
  if (job === null) return counted.join(", ");
  const plan = `${counts(job.plan.points, "point")} to solve, ${counts(job.circuit.unknowns.length, "unknown")} each`;
  return ["sound", ...counted, plan].join(", ");
}

function counts(count: number, what: string): string | null {
  return count === 0 ? null : `${count} ${what}${count === 1 ? "" : "s"}`;
}
