import type { World } from "./world";

/** Time between two words about progress, ms. */
const PAUSE_MS = 100;

/** Tells on stderr how far a file is: one line that is written over on a terminal, one line at the end elsewhere. */
export class Progress {
  private readonly begun = performance.now();
  private told = 0;

  constructor(
    private readonly name: string,
    private readonly points: number,
    private readonly world: World,
    private readonly isQuiet: boolean,
  ) {}

  tell(pointsDone: number): void {
    const now = performance.now();
    if (this.isQuiet || !this.world.err.isTerminal || now - this.told < PAUSE_MS) return;
    this.told = now;
    const share = Math.floor((100 * pointsDone) / this.points);
    this.world.err.write(`\r\u001b[K${this.name}: ${share} % of ${this.points} points`);
  }

  end(): void {
    if (this.isQuiet) return;
    const seconds = ((performance.now() - this.begun) / 1000).toFixed(2);
    const start = this.world.err.isTerminal ? "\r\u001b[K" : "";
    this.world.err.write(`${start}${this.name}: ${this.points} points in ${seconds} s\n`);
  }
}
