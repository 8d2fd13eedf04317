import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { checkWiring } from "@/lib/circuit/wiring";
import { check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { format } from "@/lib/language/format";
import { highlight } from "@/lib/language/highlight";
import { lex } from "@/lib/language/lexer";
import { parse } from "@/lib/language/parser";
import { lineStarts, placeOf } from "@/lib/language/span";

const FOLDER = join(import.meta.dirname, "../golden");

/** What each phase makes of a text, line by line. UPDATE_GOLDEN=1 writes it anew; review the difference. */
const PHASES: Readonly<Record<string, (text: string) => string[]>> = {
  lexer(text) {
    const { tokens, diagnostics } = lex(text);
    const classes = new Map(highlight(text).map((range) => [range.from, range.class]));
    const rows = tokens
      .filter((token) => token.kind !== "newline")
      .map((token) => `${token.kind} ${token.text} (${classes.get(token.from) ?? "none"})`);
    return [...rows, "", ...problems(text, diagnostics)];
  },
  parser(text) {
    const { netlist, diagnostics } = parse(text);
    return [
      ...netlist.statements.map((statement) => JSON.stringify(statement)),
      "",
      ...problems(text, diagnostics),
    ];
  },
  checker(text) {
    const { design, diagnostics } = check(text);
    const parts = Object.entries(design ?? {}).flatMap(([part, value]) => [`${part}:`, ...items(value)]);
    return [...parts, "", ...problems(text, diagnostics)];
  },
  format(text) {
    return format(text).split("\n");
  },
  wiring(text) {
    return problems(text, checkWiring(check(text).design!));
  },
};

function items(value: unknown): string[] {
  if (value instanceof Map) return [...value].map((entry) => `  ${json(entry)}`);
  return Array.isArray(value) ? value.map((item) => `  ${json(item)}`) : [`  ${json(value)}`];
}

function json(value: unknown): string {
  return JSON.stringify(value, (_, inner) => (inner instanceof Map ? Object.fromEntries(inner) : inner));
}

function problems(text: string, diagnostics: readonly Diagnostic[]): string[] {
  const starts = lineStarts(text);
  return diagnostics.map(({ code, severity, from, to, message, fix }) => {
    const { line, column } = placeOf(starts, from);
    const mend = fix === undefined ? "" : ` [${fix.title}]`;
    return `${line}:${column} ${code} ${severity} ${JSON.stringify(text.slice(from, to))} ${message}${mend}`;
  });
}

describe.each(Object.entries(PHASES))("%s", (phase, run) => {
  const folder = join(FOLDER, phase);
  const names = readdirSync(folder).filter((name) => name.endsWith(".swn"));

  test.each(names)("%s", (name) => {
    const made = run(readFileSync(join(folder, name), "utf8")).join("\n");
    const golden = join(folder, name.replace(/\.swn$/u, ".expected"));
    if (process.env.UPDATE_GOLDEN === "1") writeFileSync(golden, made);
    expect(existsSync(golden)).toBe(true);
    expect(made).toBe(readFileSync(golden, "utf8"));
  });
});
