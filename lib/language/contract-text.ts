import { formatExpression } from "./format";
import type { Expression, Statement } from "./syntax";

type RequireStatement = Extract<Statement, { kind: "require" }>;

/** A requirement without a name of its own, as the formatter writes it, from its value on. */
export function requirementText(
  { value, relation, windows, share }: RequireStatement,
  source: string,
): string {
  const text = (part: Expression) => formatExpression(source.slice(part.from, part.to));
  const parts = [text(value)];
  switch (relation.kind) {
    case "compare":
      parts.push(relation.operator, text(relation.bound));
      break;
    case "within":
      parts.push("within", text(relation.target), "±", text(relation.half));
      break;
    case "between":
      parts.push("between", text(relation.low), "and", text(relation.high));
      break;
    default:
      parts.push(relation.kind);
  }
  for (const { knob, low, high } of windows) {
    if (high === null) parts.push("at", knob.text, "=", text(low));
    else parts.push("for", knob.text, "in", text(low), "..", text(high));
  }
  if (share !== null) parts.push("in", text(share), "of draws");
  return parts.join(" ");
}
