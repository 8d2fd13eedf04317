import { compile, type Job } from "@/lib/analyses/compile";
import { coarsePlaces, type Excerpt, excerptOf, thinned } from "@/lib/analyses/excerpt";
import type { ShardResult } from "@/lib/analyses/result";
import { solvePoints } from "@/lib/analyses/sweep";
import { Course } from "./course";
import { figuresAt } from "./figures-at";
import type { PreviewAnswer, PreviewQuestion, Stage } from "./messages";
import { outlineOf } from "./outline";
import { arraysOf, rowOf } from "./row-of";

/** What the solving stands on: a thread of the browser, or a stand-in of a test. */
export interface Bench {
  post(answer: PreviewAnswer, moved: ArrayBuffer[]): void;
  /** Lets what waits for the thread come in. */
  rest(): Promise<void>;
  /** Milliseconds. */
  now(): number;
  /** Tells of a fault of the program. */
  fail(fault: unknown): void;
}

/** Ms after which the whole row, proved point by point, is left for a quicker look at it. */
const WHOLE_AT_ONCE = 16;
/** Ms after which that look is left for one at some of the places; and about what that one may take. */
const QUICK_AT_ONCE = 36;
/** Ms between two looks at whether something newer is asked. */
const SLICE = 8;
/** Ms of a first look after which it is left too when something newer is asked. */
const PATIENCE = 250;
/** Ms that a row may take in all; more is not waited for. */
const LONGEST = 20_000;
/** Points that are solved whole; a longer row is shown coarsely. */
const MOST_POINTS = 10_000;
const FEWEST_COARSE = 9;
const MOST_COARSE = 129;

/** A row as far as it is solved; `places` are those of the whole row that it has, null for all. */
interface Standing {
  readonly excerpt: Excerpt;
  readonly result: ShardResult;
  readonly places: readonly number[] | null;
  /** Places of the whole row. */
  readonly length: number;
}

/**
 * Answers the newest question: first the outline of a new text, then its row, soon and coarsely where need be, then as a queued run
 * would have it. A first look at a row is always finished, so that a knob that keeps turning is seen to move; what refines it is
 * left when something newer is asked.
 */
export class PreviewSolving {
  private newest: PreviewQuestion | null = null;
  private working = false;
  private text: string | null = null;
  private job: Job | null = null;
  private errors = 0;
  /** Ms a point of the last rows, with the proof of each and without; 0 while not known. */
  private readonly paces = { whole: 0, quick: 0 };
  private standing: Standing | null = null;
  /** The question to which `standing` is the last word. */
  private settled: PreviewQuestion | null = null;
  /** The place whose figures were sent last. */
  private shown = -1;

  constructor(private readonly bench: Bench) {}

  ask(question: PreviewQuestion): void {
    this.newest = question;
    if (!this.working) this.work().catch(this.bench.fail);
  }

  private async work(): Promise<void> {
    this.working = true;
    try {
      for (let last = -1; this.newest !== null && this.newest.number !== last; ) {
        // Questions that came together are one.
        await this.bench.rest();
        const question: PreviewQuestion = this.newest;
        last = question.number;
        await this.answer(question);
      }
    } finally {
      this.working = false;
    }
  }

  private async answer(question: PreviewQuestion): Promise<void> {
    const { number, text } = question;
    if (text !== this.text) this.read(question);
    if (this.job === null) this.post({ kind: "wrong", number, errors: this.errors });
    else if (this.settled !== null && isSame(this.settled, question)) this.showFigures(question);
    else if (await this.solve(this.job, question)) this.settled = question;
    this.post({ kind: "done", number });
  }

  private read({ number, text }: PreviewQuestion): void {
    const { job, diagnostics } = compile(text);
    this.text = text;
    this.job = job;
    this.settled = null;
    this.errors = diagnostics.filter(({ severity }) => severity === "error").length;
    if (job !== null) this.post({ kind: "outline", number, outline: outlineOf(job) });
  }

  /** False where something newer was asked before the last word on the row. */
  private async solve(job: Job, question: PreviewQuestion): Promise<boolean> {
    this.settled = null;
    this.shown = -1;
    const excerpt = excerptOf(job, question.turned);
    const length = excerpt.to - excerpt.from;
    const isShort = length <= MOST_POINTS;
    const whole = this.course(excerpt, true);
    const quick = this.course(excerpt, false);
    const show = (stage: Stage, { result, taken }: Course) =>
      this.show(question, { excerpt, result: result!, places: null, length }, stage, taken);

    if (isShort && this.paces.whole * whole.points < WHOLE_AT_ONCE && whole.run(WHOLE_AT_ONCE)) {
      this.paces.whole = whole.pace;
      show("whole", whole);
      return true;
    }
    let isQuick = isShort && this.paces.quick * quick.points < QUICK_AT_ONCE && quick.run(QUICK_AT_ONCE);
    if (!isQuick) {
      if (!(await this.lookCoarsely(excerpt, question, quick.pace))) return false;
      isQuick = isShort && (await this.finish(quick, question, LONGEST));
    }
    if (isQuick) {
      this.paces.quick = quick.pace;
      show("unproved", quick);
      if (await this.finish(whole, question, LONGEST)) {
        this.paces.whole = whole.pace;
        show("whole", whole);
        return true;
      }
    }
    if (this.isOvertaken(question)) return false;
    const pace = Math.max(whole.pace, quick.pace);
    this.post({ kind: "too large", number: question.number, why: { points: length, pace } });
    return true;
  }

  /** Solves and shows some places of a row; false where that took too long for what was asked meanwhile. */
  private async lookCoarsely(excerpt: Excerpt, question: PreviewQuestion, pace: number): Promise<boolean> {
    const count = pace > 0 ? Math.floor(QUICK_AT_ONCE / pace) : MOST_COARSE;
    const places = coarsePlaces(excerpt, Math.min(MOST_COARSE, Math.max(FEWEST_COARSE, count)));
    const thin = thinned(excerpt, places);
    const course = this.course(thin, false);
    if (!course.run(PATIENCE) && !(await this.finish(course, question, LONGEST))) {
      return !this.isOvertaken(question);
    }
    const length = excerpt.to - excerpt.from;
    this.show(question, { excerpt: thin, result: course.result!, places, length }, "coarse", course.taken);
    return true;
  }

  /** Goes on to the end, or until something newer is asked or `most` ms are spent; whether the end is reached. */
  private async finish(course: Course, question: PreviewQuestion, most: number): Promise<boolean> {
    while (!course.run(SLICE)) {
      await this.bench.rest();
      if (this.isOvertaken(question) || course.taken > most) return false;
      this.showFigures(this.newest!);
    }
    return true;
  }

  private isOvertaken(question: PreviewQuestion): boolean {
    return !isSame(question, this.newest!);
  }

  private course({ job, from, to }: Excerpt, isProving: boolean): Course {
    return new Course(solvePoints(job, from, to, isProving), to - from, () => this.bench.now());
  }

  private show(question: PreviewQuestion, standing: Standing, stage: Stage, taken: number): void {
    const { excerpt, result, places, length } = standing;
    const row = rowOf({ excerpt, result, stage, length, taken });
    this.bench.post({ kind: "row", number: question.number, row }, arraysOf(row));
    if (this.standing?.places !== places) this.shown = -1;
    this.standing = standing;
    this.showFigures(this.newest!);
  }

  /** The figures at the place that a question reads, where they are not shown yet. */
  private showFigures({ number, place }: PreviewQuestion): void {
    if (this.standing === null || place === this.shown) return;
    this.shown = place;
    const { excerpt, result, places, length } = this.standing;
    const index = places === null ? Math.min(place, length - 1) : nearest(places, place);
    const figures = { ...figuresAt(excerpt, result, index), place };
    this.bench.post({ kind: "figures", number, figures }, [figures.values.buffer as ArrayBuffer]);
  }

  private post(answer: PreviewAnswer): void {
    this.bench.post(answer, []);
  }
}

/** Whether two questions want the same curves. */
function isSame(a: PreviewQuestion, b: PreviewQuestion): boolean {
  if (a.text !== b.text || a.turned.size !== b.turned.size) return false;
  return [...a.turned].every(([knob, value]) => b.turned.get(knob) === value);
}

/** Index of the place nearest to `wanted`. */
function nearest(places: readonly number[], wanted: number): number {
  let best = 0;
  places.forEach((place, index) => {
    if (Math.abs(place - wanted) < Math.abs(places[best]! - wanted)) best = index;
  });
  return best;
}
