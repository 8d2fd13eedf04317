import type { System } from "@/lib/circuit/system";
import type { Draw } from "@/lib/circuit/values";
import type { Tolerance } from "@/lib/language/ast";

/**
 * Something that is drawn: a toleranced value of one part, or what the parts of a track group have in common. It is counted in
 * half-widths of its tolerance: 0 is nominal, ±1 the ends.
 */
export interface Variable {
  readonly key: string;
  /** A part, or `track GROUP`. */
  readonly part: string;
  /** The name of the value, `value` for the ohms, volts or amperes of the part itself; empty for a group. */
  readonly parameter: string;
  /** The parts whose figures it moves. */
  readonly elements: ReadonlySet<string>;
  /** Standard deviation, in half-widths. */
  readonly sigma: number;
  /** Half-width in the coherent unit of the value at the first point; null for a group. */
  readonly half: number | null;
  /** Step for differences, in half-widths: about a thousandth of the value. */
  readonly step: number;
}

interface Noted {
  readonly part: string;
  readonly name: string;
  readonly tolerance: Tolerance;
  readonly nominal: number;
}

/** A draw in which one variable is moved and the others are nominal. */
export class Moved implements Draw {
  variable: Variable | null = null;
  /** In half-widths. */
  by = 0;
  private readonly noted = new Map<string, Noted>();

  shift(part: string, name: string, tolerance: Tolerance, nominal: number): number {
    const key = keyOf(part, name);
    if (!this.noted.has(key)) this.noted.set(key, { part, name, tolerance, nominal });
    const { variable } = this;
    if (variable === null) return 0;
    const { amount, relative, track } = tolerance;
    const isOwn = variable.key === keyOf(part, name);
    if (track === null) return isOwn ? this.by * widthOf({ amount, relative }, nominal) : 0;
    if (isOwn) return this.by * widthOf({ amount: track.within, relative: track.relative }, nominal);
    return variable.key === groupName(track.group) ? this.by * widthOf({ amount, relative }, nominal) : 0;
  }

  /** The variables of a system at the point to which it is turned, in the order of its parts. Leaves it nominal. */
  static variablesOf(system: System): Variable[] {
    const moved = new Moved();
    system.draw(moved);
    system.draw(null);
    const variables = new Map<string, Variable>();
    for (const noted of moved.noted.values())
      for (const one of moved.ofOne(noted)) variables.set(one.key, one);
    return [...variables.values()];
  }

  private ofOne({ part, name, tolerance, nominal }: Noted): Variable[] {
    const { amount, relative, track, law, sigmas } = tolerance;
    const sigma = law === "uniform" ? 1 / Math.sqrt(3) : 1 / sigmas;
    const own = track === null ? { amount, relative } : { amount: track.within, relative: track.relative };
    const half = widthOf(own, nominal);
    const found: Variable[] =
      half === 0
        ? []
        : [
            {
              key: keyOf(part, name),
              part,
              parameter: shown(name),
              elements: new Set([part]),
              sigma,
              half,
              step: stepOf(half, nominal),
            },
          ];
    const common = widthOf({ amount, relative }, nominal);
    if (track === null || common === 0) return found;
    const members = [...this.noted.values()].filter((one) => one.tolerance.track?.group === track.group);
    const elements = new Set(members.map((one) => one.part));
    return [
      {
        key: groupName(track.group),
        part: groupName(track.group),
        parameter: "",
        elements,
        sigma,
        half: null,
        step: stepOf(common, nominal),
      },
      ...found,
    ];
  }
}

function widthOf({ amount, relative }: { amount: number; relative: boolean }, nominal: number): number {
  return Math.abs(relative ? amount * nominal : amount);
}

function stepOf(half: number, nominal: number): number {
  return nominal === 0 ? 0.03 : Math.min(0.1, Math.abs((1e-3 * nominal) / half));
}

/** Values of the part itself are kept as `.name`. */
function shown(name: string): string {
  return name.replace(/^\./u, "");
}

function keyOf(part: string, name: string): string {
  return `${part}/${name}`;
}

function groupName(group: string): string {
  return `track ${group}`;
}
