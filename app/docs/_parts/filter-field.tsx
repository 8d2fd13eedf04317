"use client";

import { useId, useState } from "react";

/** Hides the entries of the page without every word that is sought, and headings over nothing. */
function show(words: string): number {
  const sought = words.toLowerCase().split(/\s+/).filter(Boolean);
  const content = document.getElementById("content");
  let seen = 0;
  for (const entry of content?.querySelectorAll<HTMLElement>("[data-entry]") ?? []) {
    const text = entry.textContent?.toLowerCase() ?? "";
    entry.hidden = !sought.every((word) => text.includes(word));
    if (!entry.hidden) seen += 1;
  }
  for (const part of content?.querySelectorAll<HTMLElement>("section:not([data-entry])") ?? []) {
    const entries = [...part.querySelectorAll<HTMLElement>("[data-entry]")];
    part.hidden = sought.length > 0 && entries.every(({ hidden }) => hidden);
  }
  return seen;
}

/** A field that leaves of a long page only what has the words typed. */
export function FilterField({ what }: { readonly what: string }) {
  const id = useId();
  const [seen, setSeen] = useState<number | null>(null);
  return (
    <div className="mb-6 flex flex-wrap items-center gap-x-3 gap-y-1" data-print="never">
      <label htmlFor={id} className="caption">
        Filter
      </label>
      <input
        id={id}
        type="search"
        placeholder={what}
        className="h-9 w-full max-w-xs rounded-[2px] border border-edge bg-surface px-2.5 text-sm"
        onChange={({ target: { value } }) => {
          const count = show(value);
          setSeen(value.trim() === "" ? null : count);
        }}
      />
      <span role="status" className="text-quiet text-sm">
        {seen === null ? "" : seen === 0 ? "Nothing here has these words." : `${seen} shown`}
      </span>
    </div>
  );
}
