import { isKind, type Scope } from "./scope";
import type { Expression, PathPart, Setting, Statement, ToleranceSyntax, Word } from "./syntax";

/** Writes statements of a scope anew with the names they have once blocks are taken apart. */
export class Rewriter {
  /** Expressions and words written so far, so that a small text cannot unfold without end. */
  nodes = 0;

  expression(expression: Expression, scope: Scope): Expression {
    this.nodes += 1;
    switch (expression.kind) {
      case "number":
      case "hole":
        return expression;
      case "name": {
        const [head, ...rest] = expression.path;
        return { ...expression, path: [scope.flat(head!), ...rest] };
      }
      case "unary":
        return { ...expression, operand: this.expression(expression.operand, scope) };
      case "binary":
        return {
          ...expression,
          left: this.expression(expression.left, scope),
          right: this.expression(expression.right, scope),
        };
      case "call":
        return { ...expression, args: expression.args.map((arg) => this.expression(arg, scope)) };
    }
  }

  /** A group that parts of a block track with belongs to the instance; one named outside is shared by all of them. */
  tolerance(tolerance: ToleranceSyntax | null, scope: Scope): ToleranceSyntax | null {
    if (tolerance === null) return null;
    const { track } = tolerance;
    return {
      ...tolerance,
      amount: this.expression(tolerance.amount, scope),
      track:
        track === null
          ? null
          : {
              group: scope.declared(track.group),
              within: track.within && this.expression(track.within, scope),
            },
    };
  }

  range(
    range: { low: Expression; high: Expression } | null,
    scope: Scope,
  ): { low: Expression; high: Expression } | null {
    if (range === null) return null;
    return { low: this.expression(range.low, scope), high: this.expression(range.high, scope) };
  }

  /** A kind stands for itself, whatever the scope. */
  kind(word: Word, scope: Scope): Word {
    return isKind(word.text) ? word : scope.flat(word);
  }

  /** A statement that declares a value, a model or elements; null for those that belong to the file or are blocks. */
  statement(statement: Statement, scope: Scope): Statement | null {
    this.nodes += 1;
    switch (statement.kind) {
      case "let":
      case "knob":
        return {
          ...statement,
          name: scope.declared(statement.name),
          value: this.expression(statement.value, scope),
          tolerance: this.tolerance(statement.tolerance, scope),
          range: this.range(statement.range, scope),
        };
      case "model":
        return {
          ...statement,
          name: scope.declared(statement.name),
          settings: this.settings(statement, scope),
        };
      case "device":
        return {
          ...statement,
          name: scope.declared(statement.name),
          of: this.kind(statement.of, scope),
          settings: this.settings(statement, scope),
        };
      case "path":
        return {
          ...statement,
          nets: statement.nets.map((net) => scope.flat(net)),
          parts: statement.parts.map((part) => this.part(part, scope)),
        };
      case "broken":
        return { ...statement, declares: statement.declares && scope.declared(statement.declares) };
      default:
        return null;
    }
  }

  private part(part: PathPart, scope: Scope): PathPart {
    this.nodes += 1;
    return {
      ...part,
      name: scope.declared(part.name),
      kind: this.kind(part.kind, scope),
      value: part.value && this.expression(part.value, scope),
      tolerance: this.tolerance(part.tolerance, scope),
      settings: this.settings(part, scope),
    };
  }

  private settings({ settings }: { settings: readonly Setting[] }, scope: Scope): Setting[] {
    return settings.map((setting) => ({
      ...setting,
      value: this.expression(setting.value, scope),
      tolerance: this.tolerance(setting.tolerance, scope),
    }));
  }
}
