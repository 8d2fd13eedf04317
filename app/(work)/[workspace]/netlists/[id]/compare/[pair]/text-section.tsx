"use client";

import type { ComponentProps } from "react";
import { TextDiff } from "@/app/_components/diff/text-diff";

type DiffProps = ComponentProps<typeof TextDiff>;

interface Props extends Pick<DiffProps, "form" | "onForm"> {
  readonly texts: readonly [before: string, after: string];
  readonly labels: readonly [before: string, after: string];
}

/** Both texts line by line. */
export function TextSection({ texts, labels, form, onForm }: Props) {
  return (
    <section aria-labelledby="text" className="min-w-0">
      <h2 id="text" className="caption">
        Text
      </h2>
      <div className="mt-2">
        <TextDiff
          before={{ text: texts[0], label: labels[0] }}
          after={{ text: texts[1], label: labels[1] }}
          form={form}
          onForm={onForm}
        />
      </div>
    </section>
  );
}
