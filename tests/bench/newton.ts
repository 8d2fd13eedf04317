import type { Job } from "@/lib/analyses/compile";
import { array, ladder, multiplier } from "./circuits";
import { type Native, NativePrograms } from "./native";
import { bytesPerStep, nanoseconds, Steps } from "./steps";

/** Rounds in which all contestants are measured in turn, so that a busy machine hinders each alike. */
const ROUNDS = 8;

/** Nanoseconds that a batch should take. */
const BATCH = 1e6;

/** Steps and milliseconds of warming up. */
const WARM_STEPS = 30_000;
const MOST_WARMING = 3000;
const LEAST_WARMING = 2000;

const SECTIONS = [10, 100, 1000, 10_000];

/** Unknowns up to which the dense LU is measured; its cost grows with their cube. */
const MOST_AFRESH = 120;

interface Figures {
  readonly unknowns: number;
  /** Least nanoseconds of one Newton step: ours whole, our assembly, with an LU of ml-matrix built afresh, in C. */
  readonly ours: number;
  readonly assembly: number;
  readonly afresh: number | null;
  readonly native: number | null;
  /** Growth of the heap, bytes. */
  readonly bytesPerStep: number;
}

/** One Newton step by each contestant. Throws where the program in C takes another step than ours. */
function contest(job: Job, native: Native | null): Figures {
  const steps = new Steps(job);
  const take = (k: number) => steps.take(k);
  warmUp(take);
  const length = Math.max(1, Math.round(BATCH / nanoseconds(take, 100, 20)));
  const times = {
    ours: [] as number[],
    assembly: [] as number[],
    afresh: [] as number[],
    native: [] as number[],
  };
  for (let round = 0; round < ROUNDS; round++) {
    times.ours.push(nanoseconds(take, length, 25));
    times.assembly.push(nanoseconds((k) => void steps.arrive(k), length, 10));
    if (steps.size <= MOST_AFRESH) {
      times.afresh.push(nanoseconds((k) => steps.takeAfresh(k), Math.ceil(length / 200), 15));
    }
    if (native === null) continue;
    const measured = native.measure(steps.size, steps.points, length * 2, 25);
    steps.take(0);
    compare(measured.step, steps.step, job);
    times.native.push(measured.nanoseconds);
  }
  const least = (all: readonly number[]) => (all.length === 0 ? null : Math.min(...all));
  return {
    unknowns: steps.size,
    ours: least(times.ours)!,
    assembly: least(times.assembly)!,
    afresh: least(times.afresh),
    native: least(times.native),
    bytesPerStep: bytesPerStep(take, 20 * length),
  };
}

/** Takes steps until generated code has been taken into use and optimised, which a busy machine does late. */
function warmUp(take: (k: number) => void): void {
  const begun = performance.now();
  for (let k = 0; performance.now() - begun < MOST_WARMING && k < WARM_STEPS; k++) take(k);
  const late = performance.now();
  for (let k = 0; performance.now() - late < LEAST_WARMING; k++) take(k);
}

function compare(theirs: Float64Array, ours: Float64Array, { circuit, plan }: Job): void {
  const largest = { V: 0, A: 0 };
  ours.forEach((value, j) => {
    const { unit } = circuit.unknowns[j]!;
    largest[unit] = Math.max(largest[unit], Math.abs(value));
  });
  ours.forEach((value, j) => {
    const { name, unit } = circuit.unknowns[j]!;
    if (Math.abs(theirs[j]! - value) <= 1e-6 * largest[unit]) return;
    throw new Error(`${plan.title} in C takes another step of ${name}: ${theirs[j]} and not ${value}.`);
  });
}

/** The figures under the name of their circuit, as one flat object. */
function flat(name: string, figures: Figures): Record<string, number> {
  const { unknowns, ours, assembly, afresh, native } = figures;
  const named: Record<string, number | null> = {
    Unknowns: unknowns,
    StepNanoseconds: ours,
    AssemblyNanoseconds: assembly,
    StepOverAfresh: afresh === null ? null : afresh / ours,
    StepOfNative: native === null ? null : ours / native,
    BytesPerStep: figures.bytesPerStep,
  };
  const entries = Object.entries(named).filter(([, value]) => value !== null);
  return Object.fromEntries(entries.map(([word, value]) => [name + word, value!]));
}

function line(
  name: string,
  { unknowns, ours, assembly, afresh, native, bytesPerStep: bytes }: Figures,
): string {
  const n = (value: number) => (value < 100 ? value.toPrecision(2) : value.toFixed(0));
  const parts = [`${name}, ${unknowns} unknowns: ${n(ours)} ns a step (assembly ${n(assembly)} ns)`];
  if (afresh !== null) parts.push(`dense LU afresh ${n(afresh)} ns, ${n(afresh / ours)} times as long`);
  parts.push(
    native === null ? "no C to compare with" : `C ${n(native)} ns, ours ${n(ours / native)} times as long`,
  );
  parts.push(`heap grows by ${n(bytes)} bytes a step`);
  return parts.join("; ");
}

/**
 * Measures one whole Newton step (assembly, factors, solution, new unknowns) on three circuits against the same with a dense LU of
 * ml-matrix built afresh, and against C written by hand for that circuit. Prints figures and ratios; asserts nothing.
 */
function measure(): void {
  const programs = new NativePrograms();
  const isJson = process.argv.includes("--json");
  const all: Record<string, number> = {};
  const show = (name: string, figures: Figures) => {
    Object.assign(all, flat(name, figures));
    if (!isJson) console.log(line(name, figures));
    return figures;
  };
  try {
    if (!programs.hasCompiler && !isJson)
      console.log("No C compiler (cc) is present: ratios to C are left out.");
    show("multiplier", contest(multiplier(), programs.compile("multiplier")));
    show("array", contest(array(), programs.compile("array")));
    const ladders = SECTIONS.map((sections) =>
      show(
        `ladder${sections}`,
        contest(ladder(sections), programs.compile("ladder", { SECTIONS: sections })),
      ),
    );
    const perSection = ladders.map(({ ours }, k) => ours / SECTIONS[k]!);
    all.ladderCostPerSectionOf10000To100 = perSection[3]! / perSection[1]!;
    // 1 where the cost of a step is linear in the sections, 3 where it is cubic.
    all.ladderCostExponent = 1 + Math.log(perSection[3]! / perSection[1]!) / Math.log(100);
    if (isJson) console.log(JSON.stringify(all));
    else {
      const each = perSection.map((nanoseconds) => nanoseconds.toFixed(1)).join(", ");
      console.log(
        `a step a section, ns: ${each}; cost goes with N to the ${all.ladderCostExponent.toFixed(2)}`,
      );
    }
  } finally {
    programs.remove();
  }
}

measure();
