"use client";

import { useEffect, useState } from "react";
import { browserStore } from "../../draft-store";
import { type NewestDraft, newestDraft } from "../../drafts";

export type FoundDraft = { readonly state: "looking" | "none" | "no store" } | FoundOne;
type FoundOne = NewestDraft & { readonly state: "found" };

/** The newest draft of that writer in this browser; looked up again whenever the reader comes back to the page. */
export function useNewestDraft(netlist: string, writer: string): FoundDraft {
  const [found, show] = useState<FoundDraft>({ state: "looking" });
  useEffect(() => {
    const store = browserStore();
    let isHere = true;
    const look = () =>
      newestDraft(store, netlist, writer).then(
        (one) => isHere && show(one === null ? { state: "none" } : { state: "found", ...one }),
        () => isHere && show({ state: "no store" }),
      );
    const back = () => document.visibilityState === "visible" && void look();
    void look();
    document.addEventListener("visibilitychange", back);
    window.addEventListener("focus", back);
    return () => {
      isHere = false;
      document.removeEventListener("visibilitychange", back);
      window.removeEventListener("focus", back);
    };
  }, [netlist, writer]);
  return found;
}
