import { formatKnob, formatValue } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { marginSentence } from "@/app/_components/ui/margin-words";
import { formatQuantity } from "@/lib/units/quantity";
import type { Scene, StepName, TourRun } from "./steps";

/** Whether a step was done, and what is to be said of it: what it came to, or what is still wanting, if anything. */
export interface Judged {
  readonly isDone: boolean;
  readonly says: string | null;
}

const notYet = (says: string | null = null): Judged => ({ isDone: false, says });
const done = (says: string): Judged => ({ isDone: true, says });

/** Ohms from which the bend of the right end can be seen. */
const PLAIN_TO_SEE = 5;

/** What the page says of a step. Nothing is judged on a preview that is of an earlier text. */
export function judgeStep(name: StepName, scene: Scene): Judged {
  if (name === "queue" || name === "compare") return ofRuns(name, scene.runs);
  const { preview } = scene;
  if (preview.state === "wrong") return notYet("The text has an error to mend first; it is named below it.");
  if (preview.row === null || preview.outline === null || preview.isStale) return notYet();
  return { read: ofReading, turn: ofTurning, require: ofRequiring, mend: ofMending, draw: ofDraws }[name](
    scene,
  );
}

function ofReading({ preview }: Scene): Judged {
  const { place, outline, row, turned } = preview;
  const axis = outline!.axes[0];
  const [trace] = row!.traces;
  const at = axis?.values[place];
  if (axis === undefined || trace === undefined || at === undefined || !turned.has(axis.knob))
    return notYet();
  const solved = row!.axes[0]?.values.indexOf(at) ?? -1;
  const value = trace.values[solved];
  if (value === undefined) return notYet();
  return done(`at ${formatKnob(axis, at)} ${trace.name} is ${formatValue(value, trace.unit)}.`);
}

function ofTurning({ preview }: Scene): Judged {
  const { turned, outline, row } = preview;
  const knob = outline!.knobs.find((one) => one.name === "R_bulk");
  if (knob === undefined) return notYet("The text has no knob R_bulk any more; put back the original text.");
  const stands = turned.get("R_bulk") ?? knob.value;
  const words = formatKnob({ knob: knob.name, unit: knob.unit }, stands);
  if (stands < PLAIN_TO_SEE) return notYet(turned.has("R_bulk") ? `R_bulk is ${words}; further.` : null);
  const bend = row!.readings.find((one) => one.name === "bend");
  const most = Math.max(...(bend?.values ?? []).map((value) => Math.abs(value ?? 0)), 0);
  const bent = bend === undefined ? "" : `, and the curve bends by ${formatQuantity(most, bend.unit, 2)}`;
  return done(`R_bulk is ${words}${bent}.`);
}

function ofRequiring({ preview }: Scene): Judged {
  const { requirements } = preview.row!;
  const broken = requirements.find((one) => one.verdict === "broken");
  if (broken !== undefined) return done(marginSentence(broken));
  if (requirements.length === 0) return notYet();
  return notYet("There is a requirement, and it holds. Ask for 0.5 mV, and let R_bulk be 1 Ω.");
}

function ofMending({ preview, text }: Scene): Judged {
  const { row, turned } = preview;
  if (!/^require /mu.test(text))
    return notYet("Nothing is required yet; the step before this one is about it.");
  const [worst] = row!.requirements.toSorted((a, b) => (a.margin ?? 0) - (b.margin ?? 0));
  if (worst === undefined || worst.verdict !== "holds") return notYet();
  if (turned.has("R_bulk")) return notYet("It holds with the knob turned; write the value into the text.");
  return done(marginSentence(worst));
}

function ofDraws({ whole, text }: Scene): Judged {
  const has = { draws: /^draws /mu.test(text), tolerance: text.includes("±") };
  if (!has.draws || !has.tolerance) {
    if (!has.draws && !has.tolerance) return notYet();
    return notYet(
      has.draws
        ? "The draws are there; the tolerance is wanting."
        : "The tolerance is there; the draws are wanting.",
    );
  }
  if (whole.kind !== "result" || whole.text !== text)
    return notYet("Now press “Solve it here” under The whole plan.");
  const found = whole.result.frame.requirements.find((one) => one.yield !== undefined)?.yield;
  if (found === undefined) return notYet("Nothing is required, so there is no yield.");
  const percent = (share: number) => `${Math.round(100 * share)}\u202f%`;
  const { holds, of, low, high } = found;
  return done(
    `${formatCount(holds)} of ${counted(of, "draw")} hold: ${percent(low)} to ${percent(high)} of boards, with 95\u202f% confidence.`,
  );
}

function ofRuns(name: "queue" | "compare", runs: readonly TourRun[] | null): Judged {
  if (runs === null) return notYet();
  const solved = runs.filter((one) => one.status === "done");
  const [newest] = runs;
  const wanted = name === "queue" ? 1 : 2;
  if (solved.length < wanted) {
    if (newest === undefined || runs.length < wanted) return notYet();
    if (newest.status === "failed" || newest.status === "cancelled")
      return notYet(`Run ${newest.number} ${newest.status}; queue another.`);
    return notYet(`Run ${newest.number} is ${newest.status}…`);
  }
  const [last, first] = solved;
  if (name === "compare")
    return done(`runs ${first!.number} and ${last!.number} can be laid over each other.`);
  if (last!.bound === null) return notYet(`Run ${last!.number} is done; reading its proof…`);
  const failed = last!.pointsFailed === 0 ? "none failed" : `${formatCount(last!.pointsFailed)} failed`;
  return done(
    `run ${last!.number} solved ${counted(last!.points, "point")}, ${failed}; at 1\u202fµA the solution is proved within ${formatQuantity(last!.bound, "V", 2)}.`,
  );
}
