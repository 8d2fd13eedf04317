import { createHash } from "node:crypto";
import { format } from "@/lib/language/format";
import { tokenize } from "@/lib/language/lexer";
import { parseTokens } from "@/lib/language/parser";
import { Report } from "@/lib/language/report";

/** The identity of a design: SHA-256 of its canonical text, as 64 hexadecimal digits. Layout does not change it. */
export function hashOf(text: string): string {
  return createHash("sha256").update(format(text), "utf8").digest("hex");
}

/** Characters of a title. */
const MOST_TITLE = 120;

/** What a text calls itself, at most 120 characters; null when it has no title. */
export function titleIn(text: string): string | null {
  for (const { text: word } of titles(text)) {
    const title = asTitle(word.text);
    if (title !== "") return title;
  }
  return null;
}

/** `text` with another title in its place; a text without one gets none. A quotation mark in the title becomes an apostrophe. */
export function retitled(text: string, title: string): string {
  const [first] = titles(text);
  if (first === undefined) return text;
  return `${text.slice(0, first.from)}title "${title.replaceAll('"', "'")}"${text.slice(first.to)}`;
}

function titles(text: string) {
  const report = new Report();
  const { netlist } = parseTokens(tokenize(text, report), text.length, report);
  return netlist.statements.filter((statement) => statement.kind === "title");
}

/** `text` on one line and at most 120 characters long, as lists show it. */
export function asTitle(text: string): string {
  return Array.from(text.replaceAll(/\s+/g, " ").trim()).slice(0, MOST_TITLE).join("");
}
