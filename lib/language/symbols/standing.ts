import { layOut } from "../layout";
import { tokenize } from "../lexer";
import { Report } from "../report";
import { STATEMENT_WORDS, type Token } from "../token";

/** Where a cursor stands in its statement. */
export interface Standing {
  /** Tokens of the statement before the word that is being written. */
  readonly before: readonly Token[];
  /** The part of that word before the cursor, from `from` on; "" where none is begun. */
  readonly begun: string;
  readonly from: number;
  /** The word of the statement, "" for wiring. */
  readonly statement: string;
  /** Inside the braces of this kind, model or block, with what is given there already; null outside braces. */
  readonly braces: { readonly of: string; readonly given: readonly string[] } | null;
}

/** UTF-16 units behind the cursor in which the end of its braces is looked for. */
const MOST_AHEAD = 2_000;

const PART_OF_WORD = /[\p{L}\p{N}_%°]/u;

/** Null where nothing is completed: inside a comment or a text in quotation marks. */
export function standingAt(text: string, offset: number): Standing | null {
  let from = offset;
  while (from > 0 && PART_OF_WORD.test(text[from - 1]!)) from -= 1;
  // `10k` is a number with a unit begun behind it.
  const digits = /^[\p{N}]+/u.exec(text.slice(from, offset));
  if (digits !== null) from += digits[0].length;
  const tokens = tokenize(text.slice(0, offset), new Report());
  const last = tokens.at(-1);
  const isQuoted = last?.kind === "string" || last?.text.startsWith('"') === true;
  if (last !== undefined && last.to >= offset && (last.kind === "comment" || isQuoted)) return null;
  const laid = layOut(
    tokens.filter((token) => token.from < from),
    from,
  ).slice(0, -1);
  const end = laid.findLastIndex((token) => token.kind === "end");
  const before = laid.slice(end + 1).filter((token) => token.from < from);
  const first = before[0];
  const isHead = first?.kind === "word" && STATEMENT_WORDS.has(first.text);
  return {
    before,
    begun: text.slice(from, offset),
    from,
    statement: isHead ? first.text : "",
    braces: bracesAround(before, settingsAfter(text, offset)),
  };
}

/** The names that are given between an offset and the end of its braces. */
function settingsAfter(text: string, offset: number): string[] {
  const rest = text.slice(offset, offset + MOST_AHEAD);
  const close = rest.search(/[{}]/);
  const tokens = close === -1 || rest[close] === "{" ? [] : tokenize(rest.slice(0, close), new Report());
  return tokens.flatMap((token, k) => {
    return token.kind === "word" && tokens[k + 1]?.text === "=" ? [token.text] : [];
  });
}

function bracesAround(before: readonly Token[], after: readonly string[]): Standing["braces"] {
  const open = before.findLastIndex(({ kind, text }) => kind === "symbol" && (text === "{" || text === "}"));
  if (open === -1 || before[open]!.text === "}") return null;
  const colon = before.findLastIndex(({ text }, k) => k < open && text === ":");
  const given = before.flatMap((token, k) =>
    k > open && token.kind === "word" && before[k + 1]?.text === "=" ? [token.text] : [],
  );
  return { of: before[colon + 1]?.text ?? "", given: [...given, ...after] };
}
