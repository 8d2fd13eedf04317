import type { Whole } from "@/app/_components/live-example/use-whole";
import type { Previewing } from "@/app/_components/preview/previewing";
import { REQUIREMENT } from "./tour-text";

/** Names of the steps in their order; progress is kept under them. */
export type StepName = "read" | "turn" | "require" | "mend" | "draw" | "queue" | "compare";

/** What stands on the page, by which a step sees whether it was done. */
export interface Scene {
  readonly text: string;
  readonly preview: ReturnType<Previewing["present"]>;
  readonly whole: Whole;
  /** Runs of the netlist that the tour has made, the newest first; null where there is none. */
  readonly runs: readonly TourRun[] | null;
}

export interface TourRun {
  readonly id: string;
  readonly number: number;
  readonly status: string;
  readonly points: number;
  readonly pointsFailed: number;
  readonly verdict: string | null;
  /** V within which its point at 1 µA is proved; null where that is not known yet. */
  readonly bound: number | null;
}

export interface Step {
  readonly name: StepName;
  readonly title: string;
  /** One word for the row of steps. */
  readonly word: string;
  /** What this is about, then what to do; back quotes set what stands in the text. */
  readonly about: string;
  readonly task: string;
  /** What "do it for me" does, in words. */
  readonly shown: string;
  readonly needsAccount: boolean;
}

export const STEPS: readonly Step[] = [
  {
    name: "read",
    title: "Read the converter",
    word: "Read",
    about:
      "The text below is a whole netlist: an amplifier, a junction, a sweep of the input current over six decades. Beside it stands what it gives: `v_log` rises by 59 mV a decade, and `bend` says how far it is from a straight line.",
    task: "Move along the curve: press into it, or put the focus on the knob `I_in` and use the arrow keys. The values under the cursor follow.",
    shown: "moves the cursor to 1 mA",
    needsAccount: false,
  },
  {
    name: "turn",
    title: "Turn a knob and see the curve move",
    word: "Turn",
    about:
      "A knob is a value that may be turned. It moves the preview at once, and the text stays as it is until you write the value into it.",
    task: "Under Knobs, turn `R_bulk`, the bulk resistance of the junction, up to 5 Ω or more: drag it, use the arrow keys, or type 10 ohm into its field. The right end of `bend` rises.",
    shown: "turns R_bulk to 10 Ω",
    needsAccount: false,
  },
  {
    name: "require",
    title: "Say what must hold",
    word: "Require",
    about:
      "A requirement stands in the netlist, beside the circuit that has to meet it. It is judged at every point, and a bar shows how much room is left.",
    task: `Press into the text, or on “Edit the text”, and write as its last line: \`${REQUIREMENT}\`. It is broken: that is what this step is for.`,
    shown: "writes the line",
    needsAccount: false,
  },
  {
    name: "mend",
    title: "Mend it",
    word: "Mend",
    about:
      "At 1 mA each ohm of bulk resistance adds a millivolt to the logarithm. A larger junction has less of it.",
    task: "Make `R_bulk` smaller until the bar is whole, 500 mΩ for instance: in the text, or with the knob and then “Write”, which puts the value into the text.",
    shown: "writes R_bulk = 500 mΩ",
    needsAccount: false,
  },
  {
    name: "draw",
    title: "Draw parts and see the yield",
    word: "Draw",
    about:
      "The preview knows nominal values alone. Real parts scatter: a tolerance stands behind a value, and draws take parts from it by chance, the same ones each time.",
    task: "Write `± 30 %` behind the value of `R_bulk`, `draws 200 seed 7` as the last line, and press “Solve it here” under The whole plan.",
    shown: "writes both and solves the whole plan",
    needsAccount: false,
  },
  {
    name: "queue",
    title: "Queue it as a run and read its proof",
    word: "Queue",
    about:
      "Everything so far was a preview and is kept nowhere. A run is solved by the service, stored with its revision, and each of its points carries the bound within which its solution is proved.",
    task: "Open the text in your workspace, press “Queue run” on its sheet, and come back: this step sees when the run is done.",
    shown: "queues the run",
    needsAccount: true,
  },
  {
    name: "compare",
    title: "Change it and lay both runs over each other",
    word: "Compare",
    about:
      "Runs of two revisions are compared by curve, by value and by verdict. The address of that page keeps what you look at, so that a link shows a colleague the same.",
    task: "On its sheet, write 400 mΩ for `R_bulk` and queue a second run. When it is done, open the comparison from here.",
    shown: "queues a second run with R_bulk = 400 mΩ",
    needsAccount: true,
  },
];
