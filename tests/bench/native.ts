import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** What a program in C measured: nanoseconds of one Newton step, and the step from the first point. */
export interface Measured {
  readonly nanoseconds: number;
  readonly step: Float64Array;
}

/** A program of tests/bench/native, compiled. */
export interface Native {
  /** Times the step over the points, each of `size` numbers. */
  measure(size: number, points: Float64Array, steps: number, batches: number): Measured;
}

const FLAGS = ["-O3", "-march=native", "-std=gnu11"];

/** Compiled programs in a folder of their own, which `remove` takes away. */
export class NativePrograms {
  readonly hasCompiler: boolean;
  private readonly folder = mkdtempSync(join(tmpdir(), "sweepwright-bench-"));

  constructor() {
    this.hasCompiler = isThere("cc", ["--version"]);
  }

  /** Null where no compiler is present. */
  compile(name: string, defines: Readonly<Record<string, number>> = {}): Native | null {
    if (!this.hasCompiler) return null;
    const given = Object.entries(defines).map(([word, value]) => `-D${word}=${value}`);
    const program = join(this.folder, [name, ...given].join(""));
    execFileSync("cc", [...FLAGS, ...given, "-o", program, `tests/bench/native/${name}.c`, "-lm"]);
    return {
      measure: (size, points, steps, batches) => {
        const words = [size, points.length / size, steps, batches].map(String);
        const printed = execFileSync(program, words, {
          input: new Uint8Array(points.buffer),
          encoding: "utf8",
          maxBuffer: 1 << 28,
        });
        const [nanoseconds, ...step] = printed.trim().split("\n").map(Number);
        return { nanoseconds: nanoseconds!, step: Float64Array.from(step) };
      },
    };
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}

export function isThere(program: string, words: readonly string[]): boolean {
  try {
    execFileSync(program, words, { stdio: "ignore" });
    return true;
  } catch {
    return false;
  }
}
