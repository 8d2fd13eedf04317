"use client";

import { useRouter } from "next/navigation";
import { createContext, type ReactNode, useCallback, useEffect, useRef, useState } from "react";
import { isApple } from "@/app/_components/editor/keyboard";
import { useToast } from "@/app/_components/ui/toast";
import { DeedContext, DeedRegistry } from "./deed-registry";
import type { Entry } from "./deeds";
import { isQuestionKeyOn } from "./question-key";

// No page waits for either.
const loadPalette = () => import("./palette-dialog").then((found) => found.PaletteDialog);
const loadKeys = () => import("./key-dialog").then((found) => found.KeyDialog);

/** Ms after which a page is no longer busy with itself. */
const SETTLES = 1500;

export type Shown = "find" | "keys";

/** What has been fetched. */
interface Parts {
  readonly Find?: Awaited<ReturnType<typeof loadPalette>>;
  readonly Keys?: Awaited<ReturnType<typeof loadKeys>>;
}

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
  const taken = useRef<Entry | null>(null);
  /** What was typed for the list before it stood; null while it is not on its way. */
  const early = useRef<string | null>(null);
  const open = useRef<Shown | null>(null);
  const notify = useToast();
  const [shown, setShown] = useState<Shown | null>(null);
  const [parts, setParts] = useState<Parts>({});
  const show = useCallback(
    (what: Shown | null) => {
      early.current = what === "find" ? "" : null;
      open.current = what;
      setShown(what);
      if (what === null) return;
      fetchPart(what)
        .then((part) => setParts((before) => ({ ...before, ...part })))
        .catch(() => {
          show(null);
          notify({
            tone: "broken",
            title: what === "find" ? "“Find or do…” did not come" : "The list of keys did not come",
            detail: "The service did not answer. Load the page again.",
          });
        });
    },
    [notify],
  );

  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (early.current !== null && event.key.length === 1 && !event.ctrlKey && !event.metaKey) {
        early.current += event.key;
        event.preventDefault();
        event.stopPropagation();
        return;
      }
      const what = event.isComposing || event.altKey ? null : askedBy(event);
      if (what === null) return;
      event.preventDefault();
      event.stopPropagation();
      // Over another dialog it would pull the focus out of what that one asks for.
      if (document.querySelector("[role=dialog][data-state=open]:not([data-palette])") !== null) return;
      show(open.current === what ? null : what);
    };
    // Ahead of the editor, to which Ctrl K would be the first half of keys of its own.
    window.addEventListener("keydown", press, true);
    return () => window.removeEventListener("keydown", press, true);
  }, [show]);

  useEffect(() => {
    const timer = setTimeout(() => void fetchPart("find").catch(() => undefined), SETTLES);
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
        {shown === "find" && parts.Find !== undefined && (
          <parts.Find
            workspace={workspace}
            begun={() => {
              const typed = early.current ?? "";
              early.current = null;
              return typed;
            }}
            onTake={(entry) => {
              taken.current = entry;
              show(null);
            }}
            onClose={() => show(null)}
            onClosed={closed}
          />
        )}
        {shown === "keys" && parts.Keys !== undefined && <parts.Keys open onOpenChange={() => show(null)} />}
      </ShowContext.Provider>
    </DeedContext.Provider>
  );
}

async function fetchPart(what: Shown): Promise<Parts> {
  return what === "find" ? { Find: await loadPalette() } : { Keys: await loadKeys() };
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
