import { describe, expect, it } from "vitest";
import { type EndedRun, messagesOf, type News, placeOf } from "@/app/(work)/[workspace]/news";

const RUN: EndedRun = {
  id: "r1",
  number: 7,
  title: "A head",
  netlistId: "n1",
  status: "done",
  verdict: "holds",
  pointsFailed: 0,
  requestedBy: "Rosa Reviewer",
  isOwn: true,
};
const news = (runs: readonly EndedRun[]): News => ({
  now: "2026-01-01T00:00:00.000Z",
  runs,
  revisions: [{ netlistId: "n1", number: 3, title: "A head", author: "Rosa Reviewer" }],
});
const said = (at: string, runs: readonly EndedRun[] = [RUN], known: readonly string[] = []) =>
  messagesOf(news(runs), "bench", placeOf(at), (key) => known.includes(key)).map(({ title }) => title);

describe("what is told in the corner", () => {
  it("is what happened elsewhere, and nothing that the page in hand shows by itself", () => {
    expect(said("/bench/netlists/n1/revisions")).toEqual(["Run 7 holds", "Rosa Reviewer saved revision 3"]);
    expect(said("/bench/netlists/n1")).toEqual(["Run 7 holds"]);
    expect(said("/bench/runs/r1")).toEqual(["Rosa Reviewer saved revision 3"]);
    expect(said("/bench/runs/r1/report")).toEqual(["Rosa Reviewer saved revision 3"]);
    expect(said("/bench/runs")).toEqual(["Rosa Reviewer saved revision 3"]);
    expect(said("/bench")).toEqual(["Rosa Reviewer saved revision 3"]);
    expect(said("/bench/runs/compare")).toEqual(["Run 7 holds", "Rosa Reviewer saved revision 3"]);
  });

  it("is told once", () => {
    expect(said("/bench/netlists", [RUN], ["r1", "n1 3"])).toEqual([]);
  });

  it.each([
    [{ verdict: "broken" }, "Run 7 breaks a requirement"],
    [{ verdict: "no data" }, "Run 7 has no data for a requirement"],
    [{ verdict: null }, "Run 7 is done"],
    [{ pointsFailed: 2 }, "Run 7 is done, with failed points"],
    [{ status: "failed", verdict: null }, "Run 7 has failed"],
    [{ status: "cancelled", verdict: null }, "Run 7 was cancelled"],
  ] as const)("says of %o what it came to", (change, title) => {
    expect(said("/bench/netlists", [{ ...RUN, ...change }])[0]).toBe(title);
  });

  it("says who queued a run that is another's", () => {
    const [message] = messagesOf(news([{ ...RUN, isOwn: false }]), "bench", placeOf("/bench/x"), () => false);
    expect(message).toMatchObject({ detail: "A head, queued by Rosa Reviewer", tone: "holds" });
  });
});
