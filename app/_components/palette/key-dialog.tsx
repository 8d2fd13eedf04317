"use client";

import { Button } from "@/app/_components/ui/button";
import { Dialog } from "@/app/_components/ui/dialog";
import { KEY_LISTS } from "./key-lists";
import { keepQuestionKey, useQuestionKey } from "./question-key";
import { useShownKeys } from "./shown-keys";

/** Every key of the program, by where it works. */
export function KeyDialog({ open, onOpenChange }: { open: boolean; onOpenChange: (open: boolean) => void }) {
  const keys = useShownKeys();
  const isOn = useQuestionKey();
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      wide
      title="Keys"
      description="Everything on these pages can be done from the keyboard; Tab and Enter reach what has no key of its own."
      actions={<Button onClick={() => onOpenChange(false)}>Close</Button>}
    >
      <div className="columns-1 gap-x-10 sm:columns-2 lg:columns-3">
        {KEY_LISTS.map(({ where, keys: list }) => (
          <section key={where} aria-label={where} className="mb-6 break-inside-avoid">
            <h3 className="caption">{where}</h3>
            <dl className="mt-1 border-t text-sm">
              {list.map(([key, does]) => (
                <div key={key} className="grid grid-cols-[7.5rem_minmax(0,1fr)] gap-x-3 border-b py-1">
                  <dt>
                    <kbd className="figures text-xs">{keys(key)}</kbd>
                  </dt>
                  <dd>{does}</dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
      <label className="inline-flex min-h-7 items-center gap-2 text-sm">
        <input
          type="checkbox"
          checked={isOn}
          onChange={({ target }) => keepQuestionKey(target.checked)}
          className="size-3.5 accent-accent"
        />
        A question mark alone opens this list; without it, “Find or do…” does
      </label>
    </Dialog>
  );
}
