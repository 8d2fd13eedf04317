import { counted } from "@/app/_components/ui/count";
import { type Change, inWords, isWhole, listed } from "@/lib/language/changes/change";
import type { TextChanges } from "@/lib/language/changes/of-texts";

const HEADS: Record<Change["sort"], string> = {
  title: "Title",
  value: "Values",
  model: "Models",
  element: "Elements",
  net: "Nets",
  sweep: "Sweeps",
  draws: "Draws and operating points",
  trace: "Traces",
  reading: "Readings",
  requirement: "Requirements",
};

/** What changed between two texts, in words, by what it is about. `names` says what the two are called. */
export function ChangeList({
  found,
  names,
}: {
  readonly found: TextChanges;
  readonly names: readonly [before: string, after: string];
}) {
  const { state, changes, errors } = found;
  if (state !== "changed")
    return <p className="border-y py-3 text-quiet text-sm">{nothing(state, errors, names)}</p>;
  const sorts = [...new Set(changes.map(({ sort }) => sort))];
  return (
    <dl className="border-t">
      {sorts.map((sort) => (
        <div key={sort} className="grid gap-x-4 border-b py-2 sm:grid-cols-[8rem_minmax(0,1fr)]">
          <dt className="text-quiet text-sm">{HEADS[sort]}</dt>
          {changes
            .filter((one) => one.sort === sort)
            .map((one) => (
              <dd key={inWords(one)} className="min-w-0 break-words text-sm sm:col-start-2">
                {!isWhole(sort) && <b className="font-semibold">{listed(one.subjects)} </b>}
                {one.says}
              </dd>
            ))}
        </div>
      ))}
    </dl>
  );
}

function nothing(
  state: Exclude<TextChanges["state"], "changed">,
  errors: TextChanges["errors"],
  [before, after]: readonly [string, string],
): string {
  if (state === "same text") return "The texts are the same to the letter.";
  if (state === "same meaning") return "Only comments, layout or spelling differ; both mean the same.";
  const faults = [
    ...(errors.before > 0 ? [`${before} has ${counted(errors.before, "error")}`] : []),
    ...(errors.after > 0 ? [`${after} has ${counted(errors.after, "error")}`] : []),
  ];
  return `${faults.join(" and ")}, so only the lines can be compared and not what they mean.`;
}
