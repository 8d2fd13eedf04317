"use client";

import { useEffect } from "react";

/** Brings the line that the address asks for, #L12, into view and marks it, however the page was come to. */
export function AskedLine() {
  useEffect(() => {
    const mark = () => {
      for (const one of document.querySelectorAll("[data-asked]")) one.removeAttribute("data-asked");
      const asked = /^#L\d+$/.test(window.location.hash)
        ? document.getElementById(window.location.hash.slice(1))
        : null;
      asked?.setAttribute("data-asked", "");
      asked?.scrollIntoView({ block: "center" });
    };
    mark();
    window.addEventListener("hashchange", mark);
    return () => window.removeEventListener("hashchange", mark);
  }, []);
  return null;
}
