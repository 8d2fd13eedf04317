"use client";

import { usePathname } from "next/navigation";
import { useEffect, useRef } from "react";
import { useToast } from "@/app/_components/ui/toast";
import { messagesOf, type News, newsKeys, placeOf } from "./news";

/** Ms between two looks, while the page is looked at. */
const REST = 5000;

/**
 * Tells in the corner what happened elsewhere: runs of one's own that ended, and what others did to the netlist in hand. Draws
 * nothing. A look that fails is left out: all of it stands on its own page.
 */
export function NewsWatch({ workspace }: { readonly workspace: string }) {
  const notify = useToast();
  const path = usePathname();
  const at = useRef(path);
  useEffect(() => {
    at.current = path;
  }, [path]);

  useEffect(() => {
    const known = new Set<string>();
    let after: string | null = null;
    const abort = new AbortController();
    const stop = () => {
      clearInterval(timer);
      abort.abort();
    };
    const look = async () => {
      if (document.visibilityState !== "visible") return;
      const asked = placeOf(at.current);
      const search = new URLSearchParams({ workspace });
      if (after !== null) search.set("after", after);
      if (asked.netlistId !== null) search.set("netlistId", asked.netlistId);
      const response = await fetch(`/api/v1/news?${search}`, { signal: abort.signal });
      // Signed out, or no member any longer: the page says so at its next step.
      if (response.status === 401 || response.status === 404) return stop();
      if (!response.ok) return;
      const news: News = await response.json();
      if (after !== null) {
        const isKnown = (key: string) => known.has(key);
        for (const message of messagesOf(news, workspace, placeOf(at.current), isKnown)) notify(message);
      }
      for (const key of newsKeys(news)) known.add(key);
      after = news.now;
    };
    let busy = false;
    const turn = () => {
      if (busy) return;
      busy = true;
      void look()
        .catch(() => undefined)
        .finally(() => {
          busy = false;
        });
    };
    const timer = setInterval(turn, REST);
    turn();
    return stop;
  }, [workspace, notify]);
  return null;
}
