import type { ElementKind } from "@/lib/language/ast";
import { KINDS, type ParameterKind } from "@/lib/language/kinds";
import { formatAxis } from "@/lib/units/quantity";
import { Symbols } from "../_parts/math";
import { ReferenceTable } from "../_parts/reference-table";
import { SYMBOLS } from "./symbols";

/** The bounds of a parameter in words. */
export function rangeOf({ low, high, open, unit }: ParameterKind): string {
  const of = (bound: number) => formatAxis(bound, unit === "°C" ? "K" : unit);
  const ends = [
    ...(low === undefined ? [] : [`${open ? ">" : "≥"} ${of(low)}`]),
    ...(high === undefined ? [] : [`${open ? "<" : "≤"} ${of(high)}`]),
  ];
  return ends.length === 0 ? "any" : ends.join(", ");
}

const MUST = "must be given";

function absentOf({ absent }: ParameterKind): string {
  return absent ?? MUST;
}

/** Every parameter of a kind with its symbol, meaning, unit, range and what leaving it out means, from kinds.ts. */
export function ParameterTable({ kind }: { readonly kind: ElementKind }) {
  const parameters = Object.entries(KINDS[kind].parameters);
  if (parameters.length === 0) return null;
  const rows = parameters.map(([name, one]) => ({
    id: `${kind}.${name}`,
    cells: [
      <span key="name" className="flex flex-wrap items-baseline gap-x-2">
        <code>{name}</code> <Symbols>{SYMBOLS[name] ?? name}</Symbols>
      </span>,
      <>
        {one.about}
        {one.needs !== undefined && (
          <span className="text-quiet">
            ; only with <code>{one.needs}</code>
          </span>
        )}
      </>,
      one.unit === "1" ? "pure" : one.unit,
      rangeOf(one),
      absentOf(one),
    ],
  }));
  return (
    <ReferenceTable
      caption={`Parameters of ${kind}`}
      heads={["Parameter", "Meaning", "Unit", "Range", "Left out"]}
      rows={rows}
      spare={[2, 3, 4]}
      small={({ cells }) => (
        <>
          {cells[2]}; {cells[3]}; {cells[4] === MUST ? MUST : <>left out: {cells[4]}</>}
        </>
      )}
    />
  );
}
