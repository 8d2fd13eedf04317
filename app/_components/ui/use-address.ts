"use client";

import { useEffect, useRef } from "react";

/**
 * Keeps the search part of the address at `search` ("" or "?…") as it changes, without a step in the history. What the page was
 * asked for with stays as it is until something changes, however it was written.
 */
export function useAddress(search: string): void {
  const written = useRef(search);
  useEffect(() => {
    if (search === written.current) return;
    written.current = search;
    window.history.replaceState(null, "", search || window.location.pathname);
  }, [search]);
}
