import { describe, expect, it } from "vitest";
import { DIODE_TEXT, makeActor, makeNetlist, makeWorkspace } from "@/db/factories";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { getNetlist } from "@/lib/services/netlists/get-netlist";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { uploadNetlists } from "@/lib/services/netlists/upload-netlists";
import { ownDatabase } from "../integration/own-database";

ownDatabase();

const changed = DIODE_TEXT.replace("2 fA", "3 fA");
const MOST_TEXT = 262_144;

describe("createNetlist", () => {
  it("numbers the netlists of a workspace from 1 without gaps, also when made at once", async () => {
    const actor = await makeActor();
    const made = await Promise.all(Array.from({ length: 8 }, () => makeNetlist(actor)));
    const numbers = await Promise.all(made.map(async ({ id }) => (await getNetlist(actor, id)).number));
    expect(numbers.sort((a, b) => a - b)).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
  });

  it.each([
    ["what its text says", { title: "Given", text: DIODE_TEXT }, "A diode"],
    ["the given title where the text says none", { title: " Given ", text: "knob I = 1 A\n" }, "Given"],
    ["'Untitled' where there is neither", { text: "" }, "Untitled"],
    [
      "at most 120 characters of a long title, none cut in half",
      { text: `title "${"😀".repeat(200)}"\n` },
      "😀".repeat(120),
    ],
  ])("calls a netlist %s", async (_, input, title) => {
    const actor = await makeActor();
    const { id } = await createNetlist(actor, input);
    expect((await getNetlist(actor, id)).title).toBe(title);
  });

  it("keeps the text as it was written, mistakes and all", async () => {
    const actor = await makeActor();
    const text = 'title "x"\r\n  knob   V = 1 kg ??? 10 Ω ✓\n\n\n';
    const { id } = await createNetlist(actor, { text });
    expect((await getNetlist(actor, id)).text).toBe(text);
  });

  it("takes 262 144 characters and answers one more with 'too large'", async () => {
    const actor = await makeActor();
    const { id } = await createNetlist(actor, { text: "#".repeat(MOST_TEXT) });
    expect((await getNetlist(actor, id)).text).toHaveLength(MOST_TEXT);
    await expect(createNetlist(actor, { text: "#".repeat(MOST_TEXT + 1) })).rejects.toMatchObject({
      code: "too large",
    });
  });

  it.each([
    ["NUL", "a\0b"],
    ["half a surrogate pair", "a\ud800b"],
  ])("refuses a text with %s, which the database could not give back", async (_, text) => {
    await expect(createNetlist(await makeActor(), { text })).rejects.toMatchObject({ code: "invalid" });
  });

  it("refuses a viewer, and an actor of no such workspace gets nothing", async () => {
    await expect(makeNetlist(await makeActor("viewer"))).rejects.toMatchObject({ code: "not allowed" });
  });
});

describe("saveRevision", () => {
  it("adds the next revision, and the title follows the text", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const text = changed.replace("A diode", "Another diode");
    const saved = await saveRevision(actor, { netlistId: id, base: 1, text, message: "Larger current" });
    expect(saved).toMatchObject({ revision: 2, changed: true });
    expect(await getNetlist(actor, id)).toMatchObject({
      revision: 2,
      text,
      title: "Another diode",
      hash: saved.hash,
    });
  });

  it("adds nothing for a text that differs in layout only, from whatever base", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    await saveRevision(actor, { netlistId: id, base: 1, text: changed });
    const laidOut = `\n\n${changed.replaceAll(" = ", "   =  ")}\n\n`;
    const { hash } = await getNetlist(actor, id);
    for (const base of [1, 2]) {
      expect(await saveRevision(actor, { netlistId: id, base, text: laidOut })).toEqual({
        revision: 2,
        hash,
        changed: false,
      });
    }
    expect((await getNetlist(actor, id)).text).toBe(changed);
  });

  it("goes back to an earlier text as a new revision of the same hash", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const first = await getNetlist(actor, id);
    await saveRevision(actor, { netlistId: id, base: 1, text: changed });
    expect(await saveRevision(actor, { netlistId: id, base: 2, text: DIODE_TEXT })).toEqual({
      revision: 3,
      hash: first.hash,
      changed: true,
    });
  });

  it("answers a text written upon an older revision with 'conflict' and the newest number, and keeps what is there", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    await saveRevision(actor, { netlistId: id, base: 1, text: changed });
    const stale = { netlistId: id, base: 1, text: DIODE_TEXT.replace("2 fA", "4 fA") };
    await expect(saveRevision(actor, stale)).rejects.toMatchObject({
      code: "conflict",
      details: { latest: 2 },
    });
    expect(await getNetlist(actor, id)).toMatchObject({ revision: 2, text: changed });
  });

  it("lets one of many that save at once upon the same revision through", async () => {
    const actor = await makeActor();
    const { id } = await makeNetlist(actor);
    const texts = Array.from({ length: 6 }, (_, i) => DIODE_TEXT.replace("2 fA", `${i + 3} fA`));
    const results = await Promise.allSettled(
      texts.map((text) => saveRevision(actor, { netlistId: id, base: 1, text })),
    );
    const codes = results.map((result) => (result.status === "rejected" ? result.reason.code : "saved"));
    expect(codes.sort()).toEqual([...Array(5).fill("conflict"), "saved"]);
    expect((await getNetlist(actor, id)).revision).toBe(2);
  });

  it("is for writers of the same workspace", async () => {
    const room = await makeWorkspace();
    const { id } = await makeNetlist(await makeActor("engineer", room));
    const change = { netlistId: id, base: 1, text: changed };
    await expect(saveRevision(await makeActor("viewer", room), change)).rejects.toMatchObject({
      code: "not allowed",
    });
    await expect(saveRevision(await makeActor("admin"), change)).rejects.toMatchObject({ code: "not found" });
    expect(await saveRevision(await makeActor("reviewer", room), change)).toMatchObject({ revision: 2 });
  });
});

describe("getNetlist", () => {
  it.each(["not-a-uuid", "", "' OR 1=1 --", "00000000-0000-4000-8000-000000000000"])(
    "answers the id %j with 'not found'",
    async (id) => {
      await expect(getNetlist(await makeActor(), id)).rejects.toMatchObject({ code: "not found" });
    },
  );
});

describe("uploadNetlists", () => {
  it("answers each file in its turn, and one that is no netlist does not hold up the others", async () => {
    const actor = await makeActor();
    const [first, picture, empty, huge, last] = await uploadNetlists(actor, [
      { name: "head.swn", text: DIODE_TEXT },
      { name: "picture.png", text: "PNG" },
      { name: "empty.swn", text: " \n" },
      { name: "huge.swn", text: "#".repeat(MOST_TEXT + 1) },
      { name: "a/b\\Untitled Head.SWN", text: "\uFEFFknob I = 1 A\n" },
    ]);
    expect(picture).toEqual({ problem: "Only files that end in .swn are netlists." });
    expect(empty).toEqual({ problem: "The file is empty." });
    expect(huge).toMatchObject({ problem: expect.stringContaining("262\u202f145 characters") });
    const made = [first, last].map((one) => (one !== undefined && "id" in one ? one.id : ""));
    expect(await getNetlist(actor, made[0]!)).toMatchObject({ number: 1, title: "A diode" });
    expect(await getNetlist(actor, made[1]!)).toMatchObject({
      number: 2,
      title: "Untitled Head",
      text: "knob I = 1 A\n",
    });
  });

  it("cuts a long file name between characters", async () => {
    const actor = await makeActor();
    const [made] = await uploadNetlists(actor, [{ name: `${"a".repeat(119)}😀.swn`, text: "# x\n" }]);
    const id = made !== undefined && "id" in made ? made.id : "";
    expect((await getNetlist(actor, id)).title).toBe("a".repeat(119));
  });

  it("refuses a viewer before any file is read", async () => {
    const files = [{ name: "head.swn", text: DIODE_TEXT }];
    await expect(uploadNetlists(await makeActor("viewer"), files)).rejects.toMatchObject({
      code: "not allowed",
    });
  });
});
