import { memo, useId } from "react";
import { formatValue } from "@/app/_components/curves/figures-in-words";
import type { ReadingDocument } from "@/lib/analyses/result";

/** Readings that are one number a sweep; those with a value at each point are curves. */
export const ReadingRows = memo(function ReadingRows({
  readings,
}: {
  readonly readings: readonly ReadingDocument[];
}) {
  const heading = useId();
  const numbers = readings.filter(({ per }) => per === "sweep");
  if (numbers.length === 0) return null;
  return (
    <section aria-labelledby={heading}>
      <h3 id={heading} className="caption">
        Readings
      </h3>
      <dl className="mt-2 grid border-t text-sm sm:grid-cols-2 sm:gap-x-6">
        {numbers.map(({ name, unit, values }) => (
          <div key={name} className="flex justify-between gap-4 border-b py-1">
            <dt className="figures min-w-0 break-words">{name}</dt>
            <dd className="figures whitespace-nowrap">{formatValue(values[0] ?? null, unit)}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
});
