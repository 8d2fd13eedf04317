import { expect, test } from "vitest";
import { Drafts, type Shelf } from "@/app/(work)/[workspace]/netlists/[id]/drafts";

const NOON = new Date("2026-03-04T12:00:00Z");

/** A store as browsers have it. `full` refuses to keep anything. */
function shelf(full = false): Shelf & { readonly kept: Map<string, string> } {
  const kept = new Map<string, string>();
  return {
    kept,
    getItem: (key) => kept.get(key) ?? null,
    setItem: (key, value) => {
      if (full) throw new DOMException("full", "QuotaExceededError");
      kept.set(key, value);
    },
    removeItem: (key) => kept.delete(key),
  };
}

test("a text that was never saved is offered at the next visit, with its revision and its time", () => {
  const store = shelf();
  new Drafts(store, "n").keep("mine", 3, NOON);
  expect(new Drafts(store, "n").begin("saved")).toEqual({ text: "mine", base: 3, at: NOON.toISOString() });
  expect(new Drafts(store, "other").begin("saved")).toBeNull();
});

test("typing on before one has answered the offer does not lose the offered text", () => {
  const store = shelf();
  new Drafts(store, "n").keep("first", 1, NOON);
  const second = new Drafts(store, "n");
  second.begin("saved");
  second.keep("second", 1, NOON);
  const third = new Drafts(store, "n");
  expect(third.begin("saved")?.text).toBe("second");
  expect(third.dropAside()?.text).toBe("first");
  expect(third.dropAside()).toBeNull();
});

test("nothing is offered when the draft was saved, and nothing stays in the store", () => {
  const store = shelf();
  const drafts = new Drafts(store, "n");
  drafts.keep("mine", 1, NOON);
  drafts.clear();
  expect(store.kept.size).toBe(0);
  drafts.keep("mine", 1, NOON);
  expect(new Drafts(store, "n").begin("mine")).toBeNull();
  expect(store.kept.size).toBe(0);
});

test("a text set aside outlives the draft written after it; five are kept", () => {
  const store = shelf();
  const drafts = new Drafts(store, "n");
  for (const text of ["1", "2", "3", "4", "5", "6"]) drafts.setAside(text, 1, NOON);
  drafts.keep("now", 2, NOON);
  drafts.clear();
  const offered: string[] = [];
  const next = new Drafts(store, "n");
  for (let one = next.begin("saved"); one !== null; one = next.dropAside()) offered.push(one.text);
  expect(offered).toEqual(["6", "5", "4", "3", "2"]);
});

test("a full store is told, and a spoilt one is taken for an empty one", () => {
  expect(new Drafts(shelf(true), "n").keep("mine", 1, NOON)).toBe(false);
  const store = shelf();
  for (const spoilt of ["{", "null", '{"present":{"text":1},"aside":[null,7]}', "[]"]) {
    store.setItem("sweepwright-draft n", spoilt);
    expect(new Drafts(store, "n").begin("saved")).toBeNull();
  }
});
