import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { DocumentFeed } from "@/app/(work)/[workspace]/runs/[id]/document-feed";
import { type ColumnsDocument, encodeColumns } from "@/lib/analyses/columns-document";
import { OUTCOMES, type OutcomeKind } from "@/lib/solver/outcome";

interface Asked {
  readonly etag: string | null;
  readonly answer: (status: number, points?: readonly (string | null)[]) => Promise<void>;
}

/** Requests that were made, each waiting to be answered. */
let asked: Asked[];
const listener = {
  onDocument: vi.fn<(document: ColumnsDocument) => void>(),
  onProblem: vi.fn<(problem: string | null) => void>(),
};

/** A document of points with these outcomes and nothing else. */
function columns(outcome: readonly (string | null)[]): Blob {
  const column = outcome.map((one) => (one === null ? Number.NaN : OUTCOMES.indexOf(one as OutcomeKind)));
  const none = new Float64Array(outcome.length);
  const plan = { title: "", axes: [], draws: 0, points: outcome.length, traces: [], unknowns: [] };
  const matter = { plan, design: null, text: "", traces: [], failures: [], diagnostics: [] };
  const pieces = encodeColumns({
    ...matter,
    ...{ outcome: Float64Array.from(column), iterations: none, rung: none, bound: none },
  });
  return new Blob(pieces as BlobPart[]);
}

beforeEach(() => {
  vi.useFakeTimers();
  asked = [];
  vi.clearAllMocks();
  vi.stubGlobal("fetch", (_url: string, init: { headers: Record<string, string> }) => {
    return new Promise<Response>((resolve) => {
      const answer = async (status: number, outcome: readonly (string | null)[] = ["converged"]) => {
        const problem = JSON.stringify({ detail: "The database is away." });
        const body = status === 304 ? null : status === 200 ? columns(outcome) : problem;
        resolve(new Response(body, { status, headers: { etag: `W/"${asked.length}"` } }));
        await vi.advanceTimersByTimeAsync(0);
      };
      asked.push({ etag: init.headers["if-none-match"] ?? null, answer });
    });
  });
});

afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

describe("the feed of a run's document", () => {
  it("asks once at a time, and once more for all that was wanted meanwhile", async () => {
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    feed.want();
    feed.want();
    expect(asked).toHaveLength(1);
    await asked[0]!.answer(200);
    expect(asked).toHaveLength(1);
    await vi.advanceTimersByTimeAsync(200);
    expect(asked).toHaveLength(2);
    expect(asked[1]!.etag).toBe('W/"1"');
    await asked[1]!.answer(304);
    await vi.advanceTimersByTimeAsync(5000);
    expect(asked).toHaveLength(2);
    expect(listener.onDocument).toHaveBeenCalledTimes(1);
  });

  it("does not rest before the first points are in", async () => {
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    feed.want();
    await asked[0]!.answer(200, [null, null]);
    await vi.advanceTimersByTimeAsync(1);
    expect(asked).toHaveLength(2);
  });

  it("asks at once when the run has finished, then tells so, once", async () => {
    const after = vi.fn();
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    await asked[0]!.answer(200);
    feed.finish(after);
    expect(asked).toHaveLength(2);
    expect(after).not.toHaveBeenCalled();
    await asked[1]!.answer(200);
    expect(after).toHaveBeenCalledTimes(1);
    expect(listener.onDocument).toHaveBeenCalledTimes(2);
  });

  it("fetches again after a fetch that was under way when the run finished", async () => {
    const after = vi.fn();
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    feed.finish(after);
    await asked[0]!.answer(200);
    await vi.advanceTimersByTimeAsync(1);
    expect(after).not.toHaveBeenCalled();
    await asked[1]!.answer(200);
    expect(after).toHaveBeenCalledTimes(1);
  });

  it("says why it could not, and tries again by itself", async () => {
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    await asked[0]!.answer(503);
    expect(listener.onProblem).toHaveBeenLastCalledWith("The database is away.");
    await vi.advanceTimersByTimeAsync(3000);
    await asked[1]!.answer(200);
    expect(listener.onProblem).toHaveBeenLastCalledWith(null);
  });

  it("says nothing more once closed", async () => {
    const feed = new DocumentFeed("r", null, listener);
    feed.want();
    feed.close();
    await asked[0]!.answer(200);
    feed.want();
    expect(listener.onDocument).not.toHaveBeenCalled();
    expect(asked).toHaveLength(1);
  });
});
