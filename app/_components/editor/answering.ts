import { type Checked, check } from "@/lib/language/checker";
import { format } from "@/lib/language/format";
import { MOST_TEXT } from "@/lib/language/limits";
import { parse } from "@/lib/language/parser";
import { completeAt } from "@/lib/language/symbols/completion";
import { connectionsOf } from "@/lib/language/symbols/connections";
import { foldsOf } from "@/lib/language/symbols/folds";
import { hoverAt } from "@/lib/language/symbols/hover";
import { definitionAt, referencesAt } from "@/lib/language/symbols/navigate";
import { outlineOf } from "@/lib/language/symbols/outline";
import { pathsOf } from "@/lib/language/symbols/paths";
import { renameAt } from "@/lib/language/symbols/rename";
import { type Symbols, symbolsOf } from "@/lib/language/symbols/symbols";
import type { Netlist } from "@/lib/language/syntax";
import type { Answer, Question, Questions, Told } from "./questions";

/** Meanings of names whose value a solved point knows. */
const SOLVED: ReadonlySet<string> = new Set(["net", "port", "element", "model", "knob", "let"]);

/**
 * Answers questions about texts. Most questions are about the same text as the one before, so what was read of it is kept; each
 * phase is done when the first question needs it.
 */
export class Answering {
  private reading = new Reading("");

  answer(question: Question): Answer {
    if (this.reading.text !== question.text) this.reading = new Reading(question.text);
    return { number: question.number, gives: this.give(question) };
  }

  private give(question: Question): Questions[Question["ask"]]["gives"] {
    const { reading } = this;
    switch (question.ask) {
      case "complete":
        return completeAt(reading.text, { netlist: reading.netlist }, question.offset);
      case "tell":
        return tell(reading, question.offset);
      case "rename":
        return renameAt(reading.text, question.offset, question.name);
      case "folds":
        return foldsOf(reading.netlist, reading.text);
      case "outline":
        return outlineOf(reading.netlist, reading.text);
      case "connections":
        return connectionsOf(reading.netlist, reading.symbols);
      case "format":
        return format(reading.text);
    }
  }
}

class Reading {
  private parsed: Netlist | null = null;
  private named: Symbols | null = null;
  private examined: Checked | null = null;

  constructor(readonly text: string) {}

  /** What could be read; nothing of a text that is too long for a netlist. */
  get netlist(): Netlist {
    const isRead = this.text.length <= MOST_TEXT;
    this.parsed ??= this.examined?.netlist ?? (isRead ? parse(this.text).netlist : { statements: [] });
    return this.parsed;
  }

  get symbols(): Symbols {
    this.named ??= symbolsOf(this.netlist, this.text);
    return this.named;
  }

  get checked(): Checked {
    this.examined ??= check(this.text);
    return this.examined;
  }
}

function tell({ text, checked, netlist, symbols }: Reading, offset: number): Told | null {
  const hover = hoverAt(text, { netlist, design: checked.design }, offset, symbols);
  if (hover === null) return null;
  const symbol = symbols.at(offset)?.symbol;
  const isSolved = symbol !== undefined && SOLVED.has(symbol.meaning);
  return {
    ...hover,
    paths: isSolved ? pathsOf(symbol, symbols.file) : [],
    definition: definitionAt(symbols, offset),
    places: referencesAt(symbols, offset),
  };
}
