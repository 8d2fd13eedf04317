import type { Span } from "../span";
import type { Netlist, Statement } from "../syntax";

/** One line of an outline: a name with what it is; blocks hold what stands inside them. */
export interface OutlineEntry extends Span {
  readonly name: string;
  readonly what:
    | "knob"
    | "let"
    | "model"
    | "block"
    | "element"
    | "sweep"
    | "draws"
    | "shelf"
    | "trace"
    | "reading"
    | "requirement";
  readonly inside: readonly OutlineEntry[];
}

/** The outline of a netlist in the order of its text; spans are those of the statements. */
export function outlineOf({ statements }: Netlist, text: string): OutlineEntry[] {
  return statements.flatMap((statement) => entriesOf(statement, text)).filter(({ name }) => name !== "");
}

function entriesOf(statement: Statement, text: string): OutlineEntry[] {
  const { from, to } = statement;
  const entry = (name: string, what: OutlineEntry["what"]): OutlineEntry => {
    return { name, what, from, to, inside: [] };
  };
  switch (statement.kind) {
    case "knob":
    case "let":
    case "model":
      return [entry(statement.name.text, statement.kind)];
    case "block":
      return [{ ...entry(statement.name.text, "block"), inside: outlineOf(statement, text) }];
    case "device":
      return [entry(statement.name.text, "element")];
    case "path":
      return statement.parts.map((part) => ({
        ...entry(part.name.text, "element"),
        from: part.from,
        to: part.to,
      }));
    case "use":
      return [entry(statement.shelf.text, "shelf")];
    case "draws":
    case "seek":
      return [entry(text.slice(from, to), "draws")];
    case "sweep":
      return [entry(statement.knob.text, "sweep")];
    case "show":
      return statement.items.map(({ name, value, ...span }) => {
        const shown = name?.text ?? text.slice(value.from, value.to);
        return { ...entry(shown, "trace"), from: span.from, to: span.to };
      });
    case "read":
      return [entry(statement.name.text, "reading")];
    case "require":
      return [
        entry(statement.label?.text ?? text.slice(statement.value.from, statement.value.to), "requirement"),
      ];
    default:
      return [];
  }
}
