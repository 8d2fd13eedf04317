"use client";

import { Tabs as Radix } from "radix-ui";
import type { ReactNode } from "react";

export interface Tab {
  readonly value: string;
  readonly label: string;
  readonly content: ReactNode;
}

/** Tabs under one hairline; arrow keys move between them. `label` names the row of tabs. */
export function Tabs({
  label,
  tabs,
  value,
  onChange,
}: {
  readonly label: string;
  readonly tabs: readonly Tab[];
  readonly value: string;
  readonly onChange: (value: string) => void;
}) {
  return (
    <Radix.Root value={value} onValueChange={onChange}>
      <Radix.List aria-label={label} className="flex gap-6 overflow-x-auto border-b">
        {tabs.map((tab) => (
          <Radix.Trigger
            key={tab.value}
            value={tab.value}
            className="-mb-px min-h-9 whitespace-nowrap border-transparent border-b-2 text-quiet text-sm hover:text-ink data-[state=active]:border-accent data-[state=active]:font-semibold data-[state=active]:text-ink focus-visible:-outline-offset-2"
          >
            {tab.label}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map((tab) => (
        <Radix.Content key={tab.value} value={tab.value} className="pt-4">
          {tab.content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}
