"use client";

import { Dialog as Radix } from "radix-ui";
import { type ReactNode, useRef } from "react";
import { classNames } from "./class-names";

/**
 * A dialog over the page: focus stays inside, Escape closes it and gives focus back. `description` says in one sentence
 * what it is for; `actions` stand at its foot, the safe one first.
 */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  wide = false,
  children,
  actions,
}: {
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
  readonly title: string;
  readonly description: ReactNode;
  /** For texts side by side. */
  readonly wide?: boolean;
  readonly children?: ReactNode;
  readonly actions: ReactNode;
}) {
  // Without a trigger of its own the dialog would leave focus on the page's body.
  const before = useRef<Element | null>(null);
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-black/40" />
        <Radix.Content
          onOpenAutoFocus={() => {
            before.current = document.activeElement;
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            if (before.current instanceof HTMLElement) before.current.focus();
          }}
          className={classNames(
            wide ? "w-[min(1120px,calc(100vw-32px))]" : "w-[min(560px,calc(100vw-32px))]",
            "fixed top-1/2 left-1/2 z-50 max-h-[calc(100dvh-32px)] -translate-x-1/2 -translate-y-1/2 overflow-y-auto rounded-[2px] border border-edge bg-surface p-6 text-ink",
          )}
        >
          <Radix.Title className="font-semibold text-lg">{title}</Radix.Title>
          <Radix.Description className="mt-1 text-quiet text-sm">{description}</Radix.Description>
          {children !== undefined && <div className="mt-4">{children}</div>}
          {/* Where one scrolls, the way on stays in view. */}
          <div className="sticky -bottom-6 -mx-6 mt-6 -mb-6 flex flex-wrap justify-end gap-2 border-t bg-surface px-6 py-4">
            {actions}
          </div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
