import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { keep } from "@/lib/stack/keeper";
import type { Service } from "@/lib/stack/service";

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

/** A program that ends when it is told to. */
function program(): Service & { readonly end: (how: string) => void } {
  let alive = true;
  let resolve: (how: string) => void = () => undefined;
  const ended = new Promise<string>((done) => {
    resolve = done;
  });
  const end = (how: string) => {
    alive = false;
    resolve(how);
  };
  return {
    name: "worker",
    pid: 1,
    log: "worker.log",
    ended,
    running: () => alive,
    tail: () => "its last words",
    stop: async () => end("SIGTERM"),
    end,
  };
}

function told() {
  return { say: vi.fn<(sentence: string) => void>(), givenUp: vi.fn<(sentence: string) => void>() };
}

describe("a program that is kept running", () => {
  it("is started again when it ends unasked, and that is said", async () => {
    const started: ReturnType<typeof program>[] = [];
    const ears = told();
    await keep("worker", async () => started[started.push(program()) - 1]!, ears);
    started[0]!.end("SIGKILL");
    await vi.advanceTimersByTimeAsync(10);
    expect(started).toHaveLength(2);
    expect(ears.say.mock.calls.flat()).toEqual([
      "The worker ended unexpectedly (SIGKILL); starting it again.",
      "The worker runs again.",
    ]);
  });

  it("is given up with its last words when it ends again and again", async () => {
    const ears = told();
    let starts = 0;
    await keep(
      "worker",
      async () => {
        starts += 1;
        const made = program();
        made.end("exit code 3");
        return made;
      },
      ears,
    );
    await vi.advanceTimersByTimeAsync(60_000);
    expect(starts).toBe(5);
    expect(ears.givenUp.mock.calls).toEqual([
      [
        "The worker ended 5 times within a minute (exit code 3). Its log, worker.log, ends with:\nits last words",
      ],
    ]);
  });

  it("is not started again once it was stopped", async () => {
    const ears = told();
    const start = vi.fn(async () => program());
    const keeper = await keep("worker", start, ears);
    const stopped = keeper.stop();
    await vi.advanceTimersByTimeAsync(60_000);
    await stopped;
    expect(start).toHaveBeenCalledTimes(1);
    expect(ears.say).not.toHaveBeenCalled();
  });

  it("that cannot start at all is an error for the caller", async () => {
    await expect(keep("worker", () => Promise.reject(new Error("no memory")), told())).rejects.toThrow(
      "no memory",
    );
  });
});
