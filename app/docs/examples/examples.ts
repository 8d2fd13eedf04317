import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { counted } from "@/app/_components/ui/count";
import { compile } from "@/lib/analyses/compile";
import { GROUPS } from "./groups";

/** An example with what its comment and its plan say of it. */
export interface Example {
  /** Name of its file without the ending. */
  readonly name: string;
  readonly text: string;
  readonly title: string;
  /** What one learns from it, or why it is kept; a sentence or a few. */
  readonly lesson: string;
  readonly elements: number;
  /** Points of its whole plan, draws and all settings among them. */
  readonly points: number;
  readonly draws: number;
  readonly requirements: number;
  /** Operating points looked for at each setting; null for one. */
  readonly seek: number | null;
}

const FOLDER = join(/* turbopackIgnore: true */ process.cwd(), "examples");
const known = new Map<string, Example>();

/** An example by its name; null where there is none of that name. The files come with the service, so each is read once. */
export async function exampleNamed(name: string): Promise<Example | null> {
  if (!GROUPS.some(({ names }) => names.includes(name))) return null;
  const before = known.get(name);
  if (before !== undefined) return before;
  const example = read(name, await readFile(join(/* turbopackIgnore: true */ FOLDER, `${name}.swn`), "utf8"));
  known.set(name, example);
  return example;
}

/** "9 elements, 303 points, 3 requirements". */
export function planInWords({ elements, points, draws, requirements, seek }: Example): string {
  const parts = [counted(elements, "element"), counted(points, "point")];
  if (draws > 0) parts.push(counted(draws, "draw"));
  if (requirements > 0) parts.push(counted(requirements, "requirement"));
  if (seek !== null) parts.push(`up to ${seek} operating points each`);
  return parts.join(", ");
}

function read(name: string, text: string): Example {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(`The example ${name} does not compile: ${diagnostics[0]?.message}`);
  const { plan, design } = job;
  return {
    name,
    text,
    title: plan.title,
    lesson: lessonIn(text),
    elements: design.elements.length,
    points: plan.points,
    draws: plan.draws,
    requirements: design.requirements.length,
    seek: design.seek,
  };
}

/** What the comment at the head of a netlist says after "What one learns here:", else all that it says after its first sentence. */
export function lessonIn(text: string): string {
  const lines = text.split("\n");
  const end = lines.findIndex((line) => !line.startsWith("#"));
  const head = lines
    .slice(0, end)
    .map((line) => line.slice(1).trim())
    .join(" ");
  const [, learnt] = /What one learns here: (.*)$/u.exec(head) ?? [];
  const words = learnt ?? head.replace(/^Northbench Instruments \(invented\)[,:]? /u, "");
  return words.charAt(0).toUpperCase() + words.slice(1);
}
