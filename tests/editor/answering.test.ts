import { describe, expect, test } from "vitest";
import { Answering } from "@/app/_components/editor/answering";
import type { Question } from "@/app/_components/editor/questions";
import { applied } from "@/lib/language/symbols/rename";
import { place, TEXT } from "../language/symbols/netlist";

type Asked = Question extends infer Q ? (Q extends Question ? Omit<Q, "number" | "text"> : never) : never;

const answering = new Answering();
function ask(question: Asked, text = TEXT): unknown {
  const { number, gives } = answering.answer({ ...question, number: 7, text } as Question);
  expect(number).toBe(7);
  return gives;
}

describe("what the thread of the language answers", () => {
  test("what stands at a place, with its places and the names it has in the circuit", () => {
    expect(ask({ ask: "tell", offset: place("x -- RE") })).toMatchObject({
      lines: ["net x, wired to Q.e, RE"],
      paths: ["S.x"],
      places: [{ from: place("x }") }, { from: place("x -- RE") }, { from: place("x.v") }],
    });
    expect(ask({ ask: "tell", offset: place("in = s") })).toMatchObject({ paths: ["s"] });
    expect(ask({ ask: "tell", offset: place("array {") })).toMatchObject({ paths: ["array"] });
    expect(ask({ ask: "tell", offset: place("sweep") })).toMatchObject({ paths: [], definition: null });
    expect(ask({ ask: "tell", offset: place("\n\n", 0, 1) })).toBeNull();
  });

  test("a new name as edits, or why it cannot be", () => {
    const renaming = ask({ ask: "rename", offset: place("I_in"), name: "I_photo" }) as { edits: never };
    expect(applied(TEXT, renaming.edits)).toContain("sweep I_photo from");
    expect(ask({ ask: "rename", offset: place("I_in"), name: "R_out" })).toEqual({
      refusal: "`R_out` is taken: it is a value already.",
    });
  });

  test("completions, folds, an outline, connections and the canonical form, of the text that is asked about", () => {
    expect(ask({ ask: "complete", offset: place("sweep", 0, 2) })).toMatchObject([{ text: "sweep" }]);
    expect(ask({ ask: "folds" })).toEqual([{ first: 10, last: 15, what: "statement" }]);
    expect(ask({ ask: "outline" })).toHaveLength(18);
    expect(ask({ ask: "connections" })).toMatchObject({ rows: { length: 5 } });
    expect(ask({ ask: "format" }, "let   a=1 kohm\n")).toBe("let a = 1 kΩ\n");
    expect(ask({ ask: "outline" }, "let a = 1 V\n")).toHaveLength(1);
  });

  test("nothing of a text that is too long for a netlist", () => {
    const long = `let a = 1 V\n${"#".repeat(300_000)}`;
    expect(ask({ ask: "outline" }, long)).toEqual([]);
    expect(ask({ ask: "tell", offset: 4 }, long)).toBeNull();
  });
});
