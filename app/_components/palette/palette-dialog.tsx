"use client";

import { Dialog as Radix } from "radix-ui";
import { useEffect, useRef } from "react";
import type { Entry } from "./deeds";
import { FindOrDo } from "./find-or-do";

interface Props {
  readonly workspace: string;
  /** What was typed before this stood; asked for once, when the field has the focus. */
  readonly begun: () => string;
  readonly onTake: (entry: Entry) => void;
  readonly onClose: () => void;
  /** When it has gone and the focus is back. */
  readonly onClosed: () => void;
}

/** "Find or do…" over the page: focus stays inside, Escape closes it and gives focus back. */
export function PaletteDialog({ workspace, begun, onTake, onClose, onClosed }: Props) {
  const before = useRef<Element | null>(null);
  const gone = useRef(onClosed);
  useEffect(() => {
    gone.current = onClosed;
  });
  return (
    <Radix.Root open onOpenChange={(open) => !open && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/40" />
        <Radix.Content
          data-palette
          onOpenAutoFocus={() => {
            before.current = document.activeElement;
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            if (before.current instanceof HTMLElement) before.current.focus();
            gone.current();
          }}
          className="fixed top-[min(12dvh,96px)] left-1/2 z-50 w-[min(640px,calc(100vw-16px))] -translate-x-1/2 overflow-hidden rounded-[2px] border border-edge bg-surface text-ink"
        >
          <Radix.Title className="sr-only">Find or do</Radix.Title>
          <Radix.Description className="sr-only">
            Type to find a netlist, a run, a page or something to do; arrow keys choose, Enter takes it.
          </Radix.Description>
          <FindOrDo workspace={workspace} begun={begun} onTake={onTake} />
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
