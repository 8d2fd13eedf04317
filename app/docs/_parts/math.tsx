import { createElement, type ReactNode } from "react";
import { parseFormula, spoken, type Term } from "./formula";

/** Names that stand before what they are applied to, with a little room between. */
const APPLIED: readonly string[] = ["ln", "log", "exp", "min", "max"];

/** Room about a name that is applied to what follows. */
function roomAbout(term: Term): string | undefined {
  return term.kind === "name" && APPLIED.includes(term.text) ? "px-[0.17em]" : undefined;
}

/** MathML of a term. A name of one letter is set in italics by the browser, a longer one upright. `goesOn`: it follows a piece before it. */
function setTerm(term: Term, key?: number, goesOn = false): ReactNode {
  switch (term.kind) {
    case "row":
      return createElement(
        "mrow",
        { key },
        ...term.terms.map((one, k) => setTerm(one, k === 0 && goesOn ? -1 : k)),
      );
    case "name":
      return createElement("mi", { key, className: roomAbout(term) }, term.text);
    case "number":
      return createElement("mn", { key }, term.text);
    case "sign":
      return createElement("mo", { key, stretchy: "false", ...spaceOf(term.text, key === -1) }, term.text);
    case "brackets": {
      const mark = (text: string) => createElement("mo", { key: text, stretchy: "true" }, text);
      return createElement("mrow", { key }, mark("("), setTerm(term.of), mark(")"));
    }
    case "words":
      return createElement("mtext", { key, className: "px-[0.2em]" }, term.text);
    case "fraction":
      return createElement("mfrac", { key }, setTerm(term.top), setTerm(term.bottom));
    case "root":
      return createElement("msqrt", { key }, setTerm(term.of));
    case "scripts": {
      const { base, under, over } = term;
      const tag = under === null ? "msup" : over === null ? "msub" : "msubsup";
      const scripts = [under, over].filter((one) => one !== null).map((one) => setScript(one));
      const room = roomAbout(base);
      const plain = base.kind === "name" ? createElement("mi", null, base.text) : setTerm(base);
      return createElement(tag, { key, className: room }, plain, ...scripts);
    }
  }
}

/** Words in a script cling to it, unlike those on the line. */
function setScript(term: Term): ReactNode {
  return term.kind === "words" ? createElement("mtext", null, term.text) : setTerm(term);
}

/** A bar about a size clings to it; a sign that carries a formula on from the line before stands free. */
function spaceOf(sign: string, goesOn: boolean): Readonly<Record<string, string>> {
  if (sign === "∣") return { lspace: "0", rspace: "0" };
  return goesOn ? { form: "infix" } : {};
}

/** A symbol or a short formula within a sentence. */
export function Symbols({ children }: { readonly children: string }) {
  return createElement(
    "math",
    { alttext: spoken(children), className: "whitespace-nowrap" },
    setTerm(parseFormula(children)),
  );
}

/** A formula on a line of its own. A narrow screen may break it where ` | ` stands. */
export function Formula({ children }: { readonly children: string }) {
  const pieces = children.split(" | ");
  return (
    <p className="my-3 flex flex-wrap items-baseline gap-x-1.5 gap-y-1 border-l-2 pl-4 text-[1.0625rem] leading-relaxed">
      {pieces.map((piece, k) =>
        createElement(
          "math",
          { key: piece, display: "inline", displaystyle: "true", alttext: spoken(piece) },
          setTerm(parseFormula(piece), undefined, k > 0),
        ),
      )}
    </p>
  );
}
