"use client";

import { useContext } from "react";
import { ShowContext } from "./palette-provider";
import { useShownKeys } from "./shown-keys";

/** "Find or do…" in the head of each page, for those who do not know the key yet. */
export function PaletteButton() {
  const show = useContext(ShowContext);
  const keys = useShownKeys();
  return (
    <button
      type="button"
      aria-haspopup="dialog"
      aria-keyshortcuts="Control+K Meta+K"
      onClick={() => show("find")}
      className="flex min-h-8 items-center gap-2 whitespace-nowrap rounded-[2px] px-1 text-quiet text-sm hover:text-ink"
    >
      <span>
        Find<span className="hidden md:inline"> or do…</span>
      </span>
      <span aria-hidden="true" className="figures hidden text-xs md:inline">
        {keys("Ctrl K")}
      </span>
    </button>
  );
}
