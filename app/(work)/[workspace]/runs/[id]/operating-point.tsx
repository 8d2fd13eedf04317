import type { CurveSource } from "@/app/_components/curves/curve-set";
import { formatValue } from "@/app/_components/curves/figures-in-words";
import { Cell, HeadCell, Table } from "@/app/_components/ui/table";

/** A run without a sweep: one operating point, so a table of its traces and no curve. */
export function OperatingPoint({ source }: { readonly source: CurveSource }) {
  return (
    <section aria-labelledby="operating-point" className="max-w-xl py-4">
      <h2 id="operating-point" className="caption">
        Operating point
      </h2>
      <p className="mt-1 text-quiet text-sm">
        The netlist sweeps nothing, so there is one point and no curve.
      </p>
      <Table className="mt-3" aria-labelledby="operating-point">
        <thead>
          <tr>
            <HeadCell>Trace</HeadCell>
            <HeadCell figure>Value</HeadCell>
          </tr>
        </thead>
        <tbody>
          {source.traces.map(({ name, unit, values }) => (
            <tr key={name}>
              <Cell>{name}</Cell>
              <Cell figure>{formatValue(values[0] ?? null, unit)}</Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}
