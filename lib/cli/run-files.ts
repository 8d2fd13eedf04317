import { availableParallelism } from "node:os";
import { toDocument } from "@/lib/analyses/document";
import type { RunDocument } from "@/lib/analyses/result";
import { lineStarts, placeOf } from "@/lib/language/span";
import { annotation } from "./annotations";
import { budgetRows } from "./budget-rows";
import { RUN } from "./commands";
import { type Compiled, compileSource, explain, netlistCase, remarksOf } from "./compiled";
import { Crew } from "./crew";
import { EXIT, type ExitCode, gravest, Refusal } from "./exit-codes";
import { gather } from "./gather";
import { junit, type Suite } from "./junit";
import { type Given, usage, wholeNumber } from "./options";
import { Output, writeFileOf } from "./output";
import { Progress } from "./progress";
import { reportText } from "./report-text";
import { readSources } from "./sources";
import { paintFor } from "./style";
import { brokenRemarks, requirementCases } from "./verdicts";
import type { World } from "./world";

/** Threads that the system is asked for at most. */
const MOST_THREADS = 64;
/** Columns of a report that are left for the curves, and the widest curve. */
const CURVE_WIDTHS = { taken: 48, most: 40 };

/** `sweepwright run`. */
export async function runFiles(given: Given, world: World): Promise<ExitCode> {
  const [isJson, isLines] = [given.options.has("json"), given.options.has("annotations")];
  if (isJson && isLines) throw usage("--json and --annotations exclude each other.", RUN);
  const threads = Math.min(MOST_THREADS, wholeNumber(given, "threads", 1, availableParallelism(), RUN));
  const limit = wholeNumber(given, "timeout", 1, 0, RUN);
  const signal = limit === 0 ? world.signal : AbortSignal.any([world.signal, timeUp(limit)]);
  const sources = await readSources(given.files, world);
  const output = new Output(given, world);
  const paint = paintFor(output, world);
  const curve = output.isTerminal
    ? Math.max(0, Math.min(CURVE_WIDTHS.most, output.columns - CURVE_WIDTHS.taken))
    : 0;
  const crew = new Crew(threads, signal);
  const suites: Suite[] = [];
  const codes: ExitCode[] = [];
  try {
    for (const source of sources) {
      const compiled = compileSource(source);
      if (!isJson && !isLines) world.err.write(explain(compiled));
      const document = await documentOf(compiled, crew, world, given.options.has("quiet"));
      if (isJson) output.write(`${JSON.stringify(document)}\n`);
      else if (isLines) {
        for (const remark of [...remarksOf(compiled), ...brokenRemarks(compiled, document)])
          output.write(annotation(remark));
      } else if (compiled.job !== null) {
        output.write(reportText(document, budgetRows(compiled.job), source.name, paint, curve));
      }
      const cases = [netlistCase(compiled), ...requirementCases(document)];
      suites.push({ file: source.name, title: document.title, cases });
      codes.push(codeOf(compiled, document));
    }
  } finally {
    await crew.close();
  }
  output.end();
  const file = given.options.get("junit");
  if (typeof file === "string") writeFileOf(file, junit(suites), world);
  return gravest(codes);
}

/** Aborts after a time. The timer does not keep the process alive. */
function timeUp(seconds: number): AbortSignal {
  const control = new AbortController();
  const refusal = new Refusal(
    `The time of ${seconds} s was up; give more, or sweep fewer points.`,
    EXIT.service,
  );
  setTimeout(() => control.abort(refusal), 1000 * seconds).unref();
  return control.signal;
}

function codeOf({ job }: Compiled, { verdict }: RunDocument): ExitCode {
  if (job === null) return EXIT.netlist;
  return verdict === "holds" ? EXIT.holds : EXIT.broken;
}

async function documentOf(
  { source, job, diagnostics, shelf }: Compiled,
  crew: Crew,
  world: World,
  isQuiet: boolean,
): Promise<RunDocument> {
  const { name, text } = source;
  const starts = lineStarts(text);
  if (job === null) return unsolved(diagnostics.map((one) => ({ ...one, ...placeOf(starts, one.from) })));
  const { plan, design } = job;
  const progress = new Progress(name, plan.points, world, isQuiet);
  const results = await crew.solve({ text, shelf }, plan, (pointsDone) => progress.tell(pointsDone));
  const branches = plan.seek === undefined ? null : await crew.seek({ text, shelf }, plan);
  progress.end();
  return toDocument({ plan, design, text, ...gather(plan, results), branches, diagnostics });
}

/** The document of a netlist that cannot be solved. */
function unsolved(diagnostics: RunDocument["diagnostics"]): RunDocument {
  return {
    format: "sweepwright-run/1",
    title: "",
    verdict: "no data",
    axes: [],
    draws: 0,
    traces: [],
    points: { outcome: [], bound: [], iterations: [], rung: [] },
    readings: [],
    requirements: [],
    diagnostics,
    failures: [],
  };
}
