import { expect, test } from "vitest";
import type { Outline, PreviewAnswer, PreviewQuestion, Row } from "@/app/_components/preview/messages";
import { Previewing, type SolvingThread } from "@/app/_components/preview/previewing";

class Thread implements SolvingThread {
  readonly questions: PreviewQuestion[] = [];
  onmessage: SolvingThread["onmessage"] = null;
  onerror: SolvingThread["onerror"] = null;
  isEnded = false;

  postMessage(question: PreviewQuestion): void {
    this.questions.push(question);
  }
  terminate(): void {
    this.isEnded = true;
  }
  say(answer: PreviewAnswer): void {
    this.onmessage?.({ data: answer });
  }
}

/** A preview whose threads, clock and frames the test holds. */
function begin() {
  const threads: Thread[] = [];
  const frames: (() => void)[] = [];
  const clock = { ms: 0 };
  const open = () => {
    threads.push(new Thread());
    return threads.at(-1)!;
  };
  const previewing = new Previewing(
    open,
    () => clock.ms,
    (then) => frames.push(then),
  );
  const drawFrame = () => {
    for (const then of frames.splice(0)) then();
  };
  return { previewing, threads, clock, drawFrame };
}

const knob = (name: string, value: number, sweep: "first" | "outer" | null = null) => {
  return { name, unit: "A", value, range: null, sweep };
};

const OUTLINE: Outline = {
  title: "",
  axes: [{ knob: "x", unit: "A", scale: "logarithmic", values: [1, 10, 100] }],
  traces: [],
  knobs: [knob("x", 8, "first"), knob("a", 1), knob("b", 2)],
  nets: [],
  elements: [],
  lets: [],
  unknowns: 1,
  junctions: 0,
  seek: null,
};

const row = (stage: Row["stage"]): Row => {
  const empty = new Float64Array();
  return {
    stage,
    axes: OUTLINE.axes,
    length: 3,
    traces: [],
    outcome: empty,
    rung: empty,
    iterations: empty,
    bound: empty,
    failures: [],
    readings: [],
    requirements: [],
    elsewhere: [],
    temperature: 298.15,
    taken: 1,
  };
};

test("an answer to a text that has been overtaken is dropped; the last curves stay as stale meanwhile", () => {
  const { previewing, threads } = begin();
  previewing.setText("one");
  const thread = threads[0]!;
  thread.say({ kind: "outline", number: 1, outline: OUTLINE });
  thread.say({ kind: "row", number: 1, row: row("whole") });
  expect(previewing.present()).toMatchObject({ state: "ready", isStale: false });
  previewing.setText("two");
  const shown = previewing.present().row;
  thread.say({ kind: "row", number: 1, row: row("whole") });
  expect(previewing.present()).toMatchObject({ state: "solving", isStale: true });
  expect(previewing.present().row).toBe(shown);
  thread.say({ kind: "row", number: thread.questions.at(-1)!.number, row: row("unproved") });
  expect(previewing.present()).toMatchObject({ state: "solving", isStale: false });
});

test("a text with errors keeps the last curves and says that they are of an earlier one", () => {
  const { previewing, threads } = begin();
  previewing.setText("one");
  threads[0]!.say({ kind: "row", number: 1, row: row("whole") });
  previewing.setText("two");
  threads[0]!.say({ kind: "wrong", number: 2, errors: 3 });
  expect(previewing.present()).toMatchObject({
    state: "wrong",
    errors: 3,
    isStale: true,
    row: { length: 3 },
  });
});

test("turns between two frames are one question; the knob of the first sweep only says where values are read", () => {
  const { previewing, threads, drawFrame } = begin();
  previewing.setText("one");
  const thread = threads[0]!;
  thread.say({ kind: "outline", number: 1, outline: OUTLINE });
  expect(previewing.present().place).toBe(1);
  drawFrame();
  thread.questions.length = 0;
  previewing.turn("a", 5);
  previewing.turn("a", 6);
  previewing.turn("b", 7);
  expect(thread.questions).toEqual([]);
  drawFrame();
  expect(thread.questions.map(({ turned }) => [...turned])).toEqual([
    [
      ["a", 6],
      ["b", 7],
    ],
  ]);

  thread.say({ kind: "row", number: thread.questions[0]!.number, row: row("whole") });
  previewing.turn("x", 90);
  drawFrame();
  expect(previewing.present()).toMatchObject({ state: "ready", isStale: false, place: 2 });
  expect([...thread.questions.at(-1)!.turned.keys()]).toEqual(["a", "b"]);
  expect(thread.questions.at(-1)!.place).toBe(2);

  previewing.reset();
  drawFrame();
  expect(previewing.present()).toMatchObject({ turned: new Map(), place: 1 });
});

test("what a new text has, or has no longer, is not turned any more", () => {
  const { previewing, threads } = begin();
  previewing.setText("one");
  threads[0]!.say({ kind: "outline", number: 1, outline: OUTLINE });
  for (const [name, value] of [
    ["a", 5],
    ["b", 7],
    ["gone", 1],
  ] as const)
    previewing.turn(name, value);
  previewing.setText("two");
  const outline = {
    ...OUTLINE,
    knobs: [knob("x", 8, "first"), knob("a", 5), { ...knob("b", 2), range: { low: 0, high: 6 } }],
  };
  threads[0]!.say({ kind: "outline", number: 2, outline });
  expect([...previewing.present().turned]).toEqual([]);
});

test("a thread that is silent for long is replaced when something newer is asked, and only then", () => {
  const { previewing, threads, clock } = begin();
  previewing.setText("one");
  clock.ms = 2000;
  previewing.setText("two");
  clock.ms = 4000;
  previewing.setText("three");
  expect(threads.map(({ isEnded }) => isEnded)).toEqual([true, false]);
  expect(threads[1]!.questions.map(({ text }) => text)).toEqual(["three"]);
  threads[1]!.say({ kind: "done", number: 3 });
  clock.ms = 60_000;
  previewing.setText("four");
  expect(threads.length).toBe(2);
});

test("without a thread the preview is missing, and a thread that fails is begun anew with the next text", () => {
  const { previewing, threads } = begin();
  previewing.setText("one");
  threads[0]!.onerror?.({});
  expect(previewing.present().state).toBe("missing");
  previewing.setText("two");
  expect(threads.length).toBe(2);
  threads[1]!.say({ kind: "row", number: 2, row: row("whole") });
  expect(previewing.present().state).toBe("ready");
  const none = new Previewing(
    () => {
      throw new Error("No threads here.");
    },
    () => 0,
    () => 0,
  );
  none.setText("one");
  expect(none.present().state).toBe("missing");
});
