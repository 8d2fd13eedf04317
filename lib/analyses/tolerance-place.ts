import type { Design, NamedValue } from "@/lib/language/ast";
import type { Span } from "@/lib/language/span";
import type { BudgetPart } from "./budget";

/**
 * Where a text gives the tolerance that a budget names: a value of the part itself, of its model, a let or knob that the part uses,
 * or, for a track group, the first value in it. The part where nothing of that name is found; null for a part that is not there.
 */
export function tolerancePlace(
  design: Design,
  { part, parameter }: Pick<BudgetPart, "part" | "parameter">,
): Span | null {
  if (parameter === "") return groupPlace(design, part);
  const element = design.elements.find(({ name }) => name === part);
  if (element === undefined) return null;
  const model = design.models.find(({ name }) => name === element.model);
  const candidates = [
    parameter === "value" ? element.value : element.params.get(parameter),
    model?.params.get(parameter),
    ...design.lets.filter(({ name }) => name === parameter),
    ...design.knobs.filter(({ name }) => name === parameter),
  ];
  return candidates.find((one) => one?.tolerance != null) ?? element;
}

function groupPlace(design: Design, part: string): Span | null {
  const isInGroup = ({ tolerance }: NamedValue) => part === `track ${tolerance?.track?.group}`;
  return everyValue(design).find(isInGroup) ?? null;
}

function everyValue({ knobs, lets, models, elements }: Design): NamedValue[] {
  return [
    ...knobs,
    ...lets,
    ...models.flatMap(({ params }) => [...params.values()]),
    ...elements.flatMap(({ value, params }) => [...(value === null ? [] : [value]), ...params.values()]),
  ];
}
