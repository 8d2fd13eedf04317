import { expect, test } from "vitest";
import {
  type DraftStore,
  Drafts,
  type KeptDraft,
  newestDraft,
} from "@/app/(work)/[workspace]/netlists/[id]/drafts";

const NOON = new Date("2026-03-04T12:00:00Z");
const NOBODY: ReadonlySet<string> = new Set();

/** A store as browsers have it, whose writes are counted. `full` refuses to keep anything. */
function store(full = false) {
  const kept = new Map<string, KeptDraft>();
  const written: string[] = [];
  const take: DraftStore & { readonly kept: typeof kept; readonly written: typeof written } = {
    kept,
    written,
    all: async (netlist) => [...kept.values()].filter((one) => one.netlist === netlist),
    put: async (draft) => {
      await Promise.resolve();
      if (full) throw new DOMException("full", "QuotaExceededError");
      written.push(draft.text);
      kept.set(draft.id, draft);
    },
    remove: async (id) => {
      kept.delete(id);
    },
  };
  return take;
}

function drafts(
  of: DraftStore,
  tab: string,
  { netlist = "n", writer = "erik", onKept = (_: boolean) => {} } = {},
) {
  return new Drafts(of, { netlist, writer, tab }, onKept);
}

async function kept(of: DraftStore, tab: string, text: string, base = 1, at = NOON): Promise<Drafts> {
  const one = drafts(of, tab);
  one.keep(text, base, at);
  await one.settled();
  return one;
}

test("a text that was never saved is offered at the next visit, with its revision and its time", async () => {
  const shelf = store();
  await kept(shelf, "1", "mine", 3);
  expect(await drafts(shelf, "2").begin("saved", NOBODY)).toMatchObject({
    text: "mine",
    base: 3,
    at: NOON.toISOString(),
  });
  expect(await drafts(shelf, "3", { netlist: "other" }).begin("saved", NOBODY)).toBeNull();
  expect(await drafts(shelf, "4", { writer: "rosa" }).begin("saved", NOBODY)).toBeNull();
});

test("two tabs keep a draft each; the one that still lives is not offered to the other, nor touched by it", async () => {
  const shelf = store();
  const first = await kept(shelf, "1", "first");
  const second = drafts(shelf, "2");
  expect(await second.begin("saved", new Set(["1", "2"]))).toBeNull();
  second.keep("second", 1, NOON);
  first.keep("first, longer", 1, NOON);
  await Promise.all([first.settled(), second.settled()]);
  second.clear();
  await second.settled();
  expect([...shelf.kept.values()].map(({ tab, text }) => [tab, text])).toEqual([["1", "first, longer"]]);
});

test("typing on before one has answered the offer does not lose the offered text", async () => {
  const shelf = store();
  await kept(shelf, "1", "first");
  const second = drafts(shelf, "2");
  await second.begin("saved", NOBODY);
  second.keep("second", 1, new Date(NOON.getTime() + 1000));
  await second.settled();
  const third = drafts(shelf, "3");
  expect((await third.begin("saved", NOBODY))?.text).toBe("second");
  expect(third.dropAside()?.text).toBe("first");
  expect(third.dropAside()).toBeNull();
  await third.settled();
  expect(shelf.kept.size).toBe(0);
});

test("nothing is offered when the draft was saved, and nothing stays in the store", async () => {
  const shelf = store();
  const first = await kept(shelf, "1", "mine");
  first.clear();
  await first.settled();
  expect(shelf.kept.size).toBe(0);
  await kept(shelf, "1", "mine");
  const next = drafts(shelf, "2");
  expect(await next.begin("mine", NOBODY)).toBeNull();
  await next.settled();
  expect(shelf.kept.size).toBe(0);
});

test("a text set aside outlives the draft written after it; twenty are kept", async () => {
  const shelf = store();
  const first = drafts(shelf, "1");
  for (let k = 1; k <= 21; k += 1) first.setAside(String(k), 1, new Date(NOON.getTime() + k));
  first.keep("now", 2, NOON);
  first.clear();
  await first.settled();
  const offered: string[] = [];
  const next = drafts(shelf, "2");
  for (let one = await next.begin("saved", NOBODY); one !== null; one = next.dropAside())
    offered.push(one.text);
  expect(offered).toEqual(Array.from({ length: 20 }, (_, k) => String(21 - k)));
});

test("while the store is busy only the newest text waits, and it is the one that is kept", async () => {
  const shelf = store();
  const one = drafts(shelf, "1");
  one.setAside("aside", 1, NOON);
  for (let k = 0; k < 100; k += 1) one.keep(`text ${k}`, 1, NOON);
  await one.settled();
  expect(shelf.written).toEqual(["aside", "text 99"]);
});

test("a text that is taken back is kept as the present one before it leaves the others", async () => {
  const shelf = store();
  await kept(shelf, "1", "mine");
  const next = drafts(shelf, "2");
  await next.begin("saved", NOBODY);
  await next.settled();
  let least = Number.POSITIVE_INFINITY;
  const count = () => {
    least = Math.min(least, [...shelf.kept.values()].filter(({ text }) => text === "mine").length);
  };
  const watched = { ...shelf, remove: async (id: string) => shelf.remove(id).then(count) };
  const again = drafts(watched, "3");
  const offered = await again.begin("saved", NOBODY);
  again.keep(offered!.text, 1, NOON);
  again.dropAside();
  await again.settled();
  expect(least).toBe(1);
});

test("a full store is told, and again when it takes something", async () => {
  const told: boolean[] = [];
  const full = drafts(store(true), "1", { onKept: (isKept) => told.push(isKept) });
  full.keep("mine", 1, NOON);
  await full.settled();
  full.clear();
  await full.settled();
  expect(told).toEqual([false, true]);
});

test("the newest draft of a writer is found whatever tab writes it, with how many others there are", async () => {
  const shelf = store();
  expect(await newestDraft(shelf, "n", "erik")).toBeNull();
  await kept(shelf, "1", "older", 2, NOON);
  await kept(shelf, "2", "newest", 3, new Date(NOON.getTime() + 1000));
  await kept(shelf, "3", "older", 2, NOON);
  const rosas = drafts(shelf, "4", { writer: "rosa" });
  rosas.keep("rosa's", 3, new Date(NOON.getTime() + 2000));
  await rosas.settled();
  expect(await newestDraft(shelf, "n", "erik")).toMatchObject({
    draft: { text: "newest", base: 3 },
    others: 1,
  });
});
