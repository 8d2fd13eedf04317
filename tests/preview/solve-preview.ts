import type { PreviewAnswer, PreviewQuestion, Row } from "@/app/_components/preview/messages";
import { PreviewSolving } from "@/app/_components/preview/solving";

/** A solving thread without a browser: its clock goes on by `step` ms at each look, and `answers` keeps all that it says. */
export class Bench {
  readonly answers: PreviewAnswer[] = [];
  private clock = 0;
  private readonly resting: (() => void)[] = [];
  readonly solving: PreviewSolving;

  constructor(private readonly step = 0) {
    this.solving = new PreviewSolving({
      // Sent as a thread would send it, which takes the arrays away from it.
      post: (answer, moved) => this.answers.push(structuredClone(answer, { transfer: moved })),
      rest: () => new Promise<void>((resolve) => this.resting.push(resolve)),
      now: () => {
        this.clock += this.step;
        return this.clock;
      },
      fail: (fault) => {
        throw fault;
      },
    });
  }

  ask(question: Partial<PreviewQuestion> & Pick<PreviewQuestion, "number" | "text">): void {
    this.solving.ask({ turned: new Map(), place: 0, ...question });
  }

  /** Lets the thread go on from its present rest to the next; false when it does not rest. */
  async goOn(): Promise<boolean> {
    const resume = this.resting.shift();
    if (resume === undefined) return false;
    resume();
    await new Promise((resolve) => setImmediate(resolve));
    return true;
  }

  async goToEnd(): Promise<void> {
    while (await this.goOn());
  }

  rows(number?: number): Row[] {
    return this.answers.flatMap((one) =>
      one.kind === "row" && (number === undefined || one.number === number) ? [one.row] : [],
    );
  }

  kinds(): string[] {
    return this.answers.map((one) => (one.kind === "row" ? one.row.stage : one.kind));
  }
}

/** All that the preview of a text comes to. */
export async function previewOf(
  text: string,
  turned: ReadonlyMap<string, number> = new Map(),
  place = 0,
): Promise<Bench> {
  const bench = new Bench();
  bench.ask({ number: 1, text, turned, place });
  await bench.goToEnd();
  return bench;
}
