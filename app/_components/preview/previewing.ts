import { isAlike } from "./alike";
import type {
  Figures,
  KnobOutline,
  Outline,
  PreviewAnswer,
  PreviewQuestion,
  Row,
  TooLarge,
} from "./messages";
import { valueAtPlace } from "./value-at-place";

/** The side of the solving thread that a page needs; a `Worker` has it, and so has a stand-in of a test. */
export interface SolvingThread {
  postMessage(question: PreviewQuestion): void;
  terminate(): void;
  onmessage: ((event: { readonly data: PreviewAnswer }) => void) | null;
  onerror: ((event: unknown) => void) | null;
}

/** What stands in the preview pane. */
export interface Preview {
  /** "wrong": the text has errors. "too large": the row is not shown whole. "missing": the browser starts no thread. */
  readonly state: "solving" | "ready" | "wrong" | "too large" | "missing";
  /** Errors of the text, where it is wrong. */
  readonly errors: number;
  readonly why: TooLarge | null;
  /** Of the latest text without errors. */
  readonly outline: Outline | null;
  /** The latest curves, and whether they are of an earlier text or setting than the one asked for. */
  readonly row: Row | null;
  readonly isStale: boolean;
  /**
   * What the knobs are turned to, where that is not what the text has. That of the first sweep only says where along it values are
   * read, and that of an outer one which of its settings is shown.
   */
  readonly turned: ReadonlyMap<string, number>;
  /** The place along the first sweep at which values are read. */
  readonly place: number;
  readonly figures: Figures | null;
}

/** Ms of silence after which a thread is given up when something newer waits: a single point may take very long. */
const SILENCE = 3000;

const NOTHING: Preview = {
  state: "solving",
  errors: 0,
  why: null,
  outline: null,
  row: null,
  isStale: false,
  turned: new Map(),
  place: 0,
  figures: null,
};

/** The preview of one sheet: asks a thread, keeps what it answers, and tells those who listen. */
export class Previewing {
  private preview = NOTHING;
  private readonly listeners = new Set<() => void>();
  private thread: SolvingThread | null = null;
  private number = 0;
  /** The first question that wanted the present text and knobs. */
  private since = 0;
  private text: string | null = null;
  /** When the thread was last heard of, or woken. */
  private heard = 0;
  private isBusy = false;
  private frame: number | null = null;

  /** `open` starts a thread; `now` tells milliseconds; `nextFrame` calls back before the next picture. */
  constructor(
    private readonly open: () => SolvingThread,
    private readonly now: () => number,
    private readonly nextFrame: (then: () => void) => number,
  ) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly present = (): Preview => this.preview;

  /** Shows another text. */
  setText(text: string): void {
    if (text === this.text) return;
    this.text = text;
    this.want({});
    this.send();
  }

  /** Turns a knob; null to what the text has. What is turned between two frames is asked for at once. */
  turn(knob: string, value: number | null): void {
    const turned = new Map(this.preview.turned);
    if (value === null) turned.delete(knob);
    else turned.set(knob, value);
    const { outline } = this.preview;
    if (outline?.axes[0]?.knob === knob) this.tell({ turned, place: placeOf(outline, turned) });
    else this.want({ turned });
    this.sendSoon();
  }

  /** Puts the knobs back to what the text has. */
  reset(): void {
    const turned = new Map<string, number>();
    const { outline } = this.preview;
    this.want({ turned, place: outline === null ? 0 : placeOf(outline, turned) });
    this.sendSoon();
  }

  /** What a name of the text is worth where the preview is read, in words; null where nothing is known of it. */
  readonly valueAt = (name: string): string | null => {
    const { outline, figures } = this.preview;
    return outline === null || figures === null ? null : valueAtPlace(outline, figures, name);
  };

  /** Ends the thread. What was shown stays, and another text begins anew. */
  close(): void {
    this.thread?.terminate();
    this.thread = null;
    this.isBusy = false;
    this.text = null;
  }

  private want(change: Partial<Preview>): void {
    this.since = this.number + 1;
    const { row, state } = this.preview;
    this.tell({ state: state === "missing" ? state : "solving", ...change, isStale: row !== null });
  }

  private sendSoon(): void {
    this.frame ??= this.nextFrame(() => {
      this.frame = null;
      this.send();
    });
  }

  private send(): void {
    if (this.text === null) return;
    const now = this.now();
    if (this.isBusy && now - this.heard > SILENCE) {
      this.thread?.terminate();
      this.thread = null;
    }
    this.thread ??= this.begin();
    if (this.thread === null) return;
    if (!this.isBusy) this.heard = now;
    this.isBusy = true;
    this.number += 1;
    const { outline, place } = this.preview;
    const turned = new Map(this.preview.turned);
    turned.delete(outline?.axes[0]?.knob ?? "");
    this.thread.postMessage({ number: this.number, text: this.text, turned, place });
  }

  private begin(): SolvingThread | null {
    try {
      const thread = this.open();
      thread.onmessage = ({ data }) => {
        if (thread === this.thread) this.receive(data);
      };
      thread.onerror = () => {
        if (thread === this.thread) this.lose();
      };
      return thread;
    } catch {
      this.lose();
      return null;
    }
  }

  private lose(): void {
    this.thread?.terminate();
    this.thread = null;
    this.isBusy = false;
    this.tell({ state: "missing" });
  }

  private receive(answer: PreviewAnswer): void {
    this.heard = this.now();
    if (answer.kind === "done" && answer.number === this.number) this.isBusy = false;
    if (answer.number < this.since) return;
    if (answer.kind === "wrong") this.tell({ state: "wrong", errors: answer.errors });
    else if (answer.kind === "outline") this.outlined(answer.outline);
    else if (answer.kind === "figures") this.tell({ figures: answer.figures });
    else if (answer.kind === "too large") this.tell({ state: "too large", why: answer.why, errors: 0 });
    else if (answer.kind === "row") {
      const { row } = answer;
      const state = row.stage === "whole" ? "ready" : "solving";
      this.tell({ row, state, isStale: false, why: null, errors: 0 });
    }
  }

  /** Knobs that a new text does not have, or has at the same value, are no longer turned; nor are those that would leave their range. */
  private outlined(told: Outline): void {
    const before = this.preview.outline;
    // Most key strokes change a value and not what the text is about; then nothing that shows it is drawn anew.
    const outline = before !== null && isAlike(before, told) ? before : told;
    const turned = new Map(
      [...this.preview.turned].filter(([name, value]) => {
        const knob = outline.knobs.find((one) => one.name === name);
        return knob !== undefined && knob.value !== value && isWithin(knob, value);
      }),
    );
    const place = placeOf(outline, turned);
    const moved = place !== this.preview.place || turned.size !== this.preview.turned.size;
    // The figures are counted in the order of the outline that they came with.
    const figures = outline === before ? this.preview.figures : null;
    if (outline !== before || moved) this.tell({ outline, turned, place, figures });
    if (moved) this.sendSoon();
  }

  private tell(change: Partial<Preview>): void {
    this.preview = { ...this.preview, ...change };
    for (const listener of this.listeners) listener();
  }
}

function isWithin({ range }: KnobOutline, value: number): boolean {
  return range === null || (value >= range.low && value <= range.high);
}

/** The place on the first axis nearest to what its knob is turned to, or has in the text; by ratio on a logarithmic axis. */
function placeOf({ axes, knobs }: Outline, turned: ReadonlyMap<string, number>): number {
  const [axis] = axes;
  if (axis === undefined) return 0;
  const { knob, scale, values } = axis;
  const wanted = turned.get(knob) ?? knobs.find(({ name }) => name === knob)?.value ?? Number.NaN;
  const isRatio = scale === "logarithmic";
  const apart = (value: number) =>
    isRatio && value * wanted > 0 ? Math.abs(Math.log(value / wanted)) : Math.abs(value - wanted);
  let best = 0;
  values.forEach((value, place) => {
    if (apart(value) < apart(values[best]!)) best = place;
  });
  return best;
}
