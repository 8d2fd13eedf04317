import { MarginBar } from "@/app/_components/ui/margin-bar";
import { limitsInWords, placeInWords, worstInWords } from "@/app/_components/ui/margin-words";
import { StateBadge } from "@/app/_components/ui/state-badge";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";

/** Every requirement in the order of the text: verdict, worst value and where, what is allowed, margin, yield. */
export function ReportRequirements({
  requirements,
}: {
  readonly requirements: readonly RequirementDocument[];
}) {
  if (requirements.length === 0) return <p>The netlist has no requirement.</p>;
  return (
    <TableFrame label="Requirements of the run">
      <Table>
        <caption>Requirements with their verdicts, worst values and margins</caption>
        <thead>
          <tr>
            <HeadCell>Requirement</HeadCell>
            <HeadCell>Verdict</HeadCell>
            <HeadCell figure>Worst value</HeadCell>
            <HeadCell figure>Allowed</HeadCell>
            <HeadCell figure>Margin</HeadCell>
          </tr>
        </thead>
        <tbody>
          {requirements.map((one, index) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: labels need not differ
            <tr key={index}>
              <th scope="row" className="border-b py-1.5 pr-4 text-left align-top font-normal">
                <span className="font-semibold">{one.label}</span>
                <span className="block text-quiet text-xs">{besides(one)}</span>
              </th>
              <Cell>
                <StateBadge state={one.verdict} />
                <MarginBar requirement={one} className="mt-1" decorative />
              </Cell>
              <Cell figure>{worstInWords(one)}</Cell>
              <Cell figure>{limitsInWords(one) || "not known"}</Cell>
              <Cell figure>{one.margin === null ? "none" : formatQuantity(one.margin, one.unit, 3)}</Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </TableFrame>
  );
}

function besides(one: RequirementDocument): string {
  const place = placeInWords(one);
  const found = one.yield;
  return [
    place === "" ? "" : `worst at ${place}`,
    found === undefined ? "" : `holds in ${found.holds} of ${found.of} draws`,
    one.remark ?? "",
  ]
    .filter((part) => part !== "")
    .join("; ");
}
