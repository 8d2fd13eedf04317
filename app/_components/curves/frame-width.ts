"use client";

import { type RefObject, useLayoutEffect, useState } from "react";

/** The width of an element in whole px, kept current; 0 before it is known, which is before the first paint in a browser. */
export function useWidth(element: RefObject<HTMLElement | null>): number {
  const [width, setWidth] = useState(0);
  useLayoutEffect(() => {
    const { current } = element;
    if (current === null) return;
    setWidth(Math.floor(current.getBoundingClientRect().width));
    const observer = new ResizeObserver(([entry]) => {
      if (entry !== undefined) setWidth(Math.floor(entry.contentRect.width));
    });
    observer.observe(current);
    return () => observer.disconnect();
  }, [element]);
  return width;
}
