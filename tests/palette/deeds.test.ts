import { describe, expect, it } from "vitest";
import { DeedRegistry } from "@/app/_components/palette/deed-registry";
import { answering, type Deed, rank } from "@/app/_components/palette/deeds";
import { without } from "@/app/_components/palette/use-found";

const deed = (id: string, words: string, more: Partial<Deed> = {}): Deed => ({
  id,
  words,
  does: "/there",
  ...more,
});

const PAGE = [
  deed("history", "History", { also: "revisions" }),
  deed("queue", "Queue run", { also: "start solve" }),
  deed("requeue", "Look at what is queued"),
  deed("revision", "Save revision", { note: "upon revision 4" }),
];

const found = (query: string) => answering("here", PAGE, query).map(({ id }) => id);

describe("what answers to a query", () => {
  it("is everything, in its own order, while nothing is typed", () => {
    expect(found("  ")).toEqual(["history", "queue", "requeue", "revision"]);
  });

  it("comes first where its words begin so, before where a word of it does", () => {
    expect(found("QUEUE")).toEqual(["queue", "requeue"]);
    expect(found("que ru")).toEqual(["queue"]);
  });

  it("answers to other words and to its note, after all that say it themselves", () => {
    expect(found("revision")).toEqual(["revision", "history"]);
    expect(found("upon")).toEqual(["revision"]);
    expect(found("solve")).toEqual(["queue"]);
  });

  it("needs every word that was typed", () => {
    expect(found("queue revision")).toEqual([]);
  });

  it("is one of very many only when it is asked for", () => {
    const one = deed("example", "Example: log ratio head", { onlyAsked: true });
    expect(answering("reading", [one], "")).toEqual([]);
    expect(answering("reading", [one], "ratio")).toHaveLength(1);
  });

  it("reads the narrow space of a quantity as a space", () => {
    expect(rank(deed("t", "Hide trace at 25\u202f°C"), "25 °c")).toBe(1);
  });
});

describe("what the service is asked", () => {
  it.each([
    ["run 348", "348"],
    ["Runs of ratio", "of ratio"],
    ["running", "running"],
    ["run", ""],
  ])("leaves the kind of thing out of %s", (query, asked) => {
    expect(without("run", query)).toBe(asked);
  });
});

describe("what a page offers", () => {
  it("stands by order, is that of the last render, and goes with the part that offered it", () => {
    const registry = new DeedRegistry();
    let late = [deed("export", "Export")];
    const leave = registry.add({ group: "here", order: 2, deeds: () => late });
    registry.add({ group: "here", order: 0, deeds: () => [deed("queue", "Queue run")] });
    registry.add({ group: "self", order: 0, deeds: () => [deed("leave", "Sign out")] });
    expect(registry.of("here").map(({ id }) => id)).toEqual(["queue", "export"]);
    late = [deed("print", "Print")];
    expect(registry.of("here").map(({ id }) => id)).toEqual(["queue", "print"]);
    leave();
    expect(registry.of("here").map(({ id }) => id)).toEqual(["queue"]);
  });
});
