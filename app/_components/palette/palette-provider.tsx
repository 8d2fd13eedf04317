"use client";

import dynamic from "next/dynamic";
import { useRouter } from "next/navigation";
import { createContext, type ReactNode, useEffect, useRef, useState } from "react";
import { isApple } from "@/app/_components/editor/keyboard";
import { DeedContext, DeedRegistry } from "./deed-registry";
import type { Entry } from "./deeds";
import { isQuestionKeyOn } from "./question-key";

// No page waits for either; the first comes as soon as the page rests, since what is typed after its key is meant for it.
const loadPalette = () => import("./palette-dialog").then((found) => found.PaletteDialog);
const PaletteDialog = dynamic(loadPalette, { loading: () => null });
const KeyDialog = dynamic(() => import("./key-dialog").then((found) => found.KeyDialog), {
  loading: () => null,
});

/** Ms after which a page is no longer busy with itself. */
const SETTLES = 1500;

export type Shown = "find" | "keys";

/** Opens "Find or do…" or the list of keys. */
export const ShowContext = createContext<(what: Shown) => void>(() => {});

/** Keeps what pages offer, and opens "Find or do…" by Ctrl K from anywhere, the editor too, and the list of keys by a question mark. */
export function PaletteProvider({
  workspace,
  children,
}: {
  readonly workspace: string;
  readonly children: ReactNode;
}) {
  const router = useRouter();
  const [registry] = useState(() => new DeedRegistry());
  const [shown, show] = useState<Shown | null>(null);
  const taken = useRef<Entry | null>(null);

  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const what = event.isComposing || event.altKey ? null : askedBy(event);
      if (what === null) return;
      event.preventDefault();
      event.stopPropagation();
      // Over another dialog it would pull the focus out of what that one asks for.
      if (document.querySelector("[role=dialog][data-state=open]:not([data-palette])") !== null) return;
      show((before) => (before === what ? null : what));
    };
    // Ahead of the editor, to which Ctrl K would be the first half of keys of its own.
    window.addEventListener("keydown", press, true);
    return () => window.removeEventListener("keydown", press, true);
  }, []);

  useEffect(() => {
    const timer = setTimeout(() => void loadPalette().catch(() => undefined), SETTLES);
    return () => clearTimeout(timer);
  }, []);

  /** Once the list is gone and the focus is back where it was, so that what is done finds the page as it stood. */
  const closed = () => {
    const does = taken.current?.does;
    taken.current = null;
    if (typeof does === "string") router.push(does);
    else does?.();
  };

  return (
    <DeedContext.Provider value={registry}>
      <ShowContext.Provider value={show}>
        {children}
        {shown === "find" && (
          <PaletteDialog
            workspace={workspace}
            onTake={(entry) => {
              taken.current = entry;
              show(null);
            }}
            onClose={() => show(null)}
            onClosed={closed}
          />
        )}
        {shown === "keys" && <KeyDialog open onOpenChange={() => show(null)} />}
      </ShowContext.Provider>
    </DeedContext.Provider>
  );
}

function askedBy(event: KeyboardEvent): Shown | null {
  const command = isApple() ? event.metaKey && !event.ctrlKey : event.ctrlKey && !event.metaKey;
  if (command && !event.shiftKey && event.key.toLowerCase() === "k") return "find";
  if (event.key !== "?" || event.ctrlKey || event.metaKey || !isQuestionKeyOn()) return null;
  const takesText =
    event.target instanceof Element &&
    event.target.closest("input, textarea, select, [contenteditable], [role=textbox], [role=menu]") !== null;
  return takesText ? null : "keys";
}
