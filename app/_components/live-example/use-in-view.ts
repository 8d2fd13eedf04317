"use client";

import { type RefObject, useEffect, useState } from "react";

/** Px below and above the window within which something counts as seen: it is to be ready when one comes to it. */
const AHEAD = "300px";

/** True once an element has been near the window. */
export function useInView(place: RefObject<Element | null>): boolean {
  const [isSeen, setSeen] = useState(false);
  useEffect(() => {
    if (isSeen || place.current === null) return;
    const watch = new IntersectionObserver(
      (entries) => entries.some((entry) => entry.isIntersecting) && setSeen(true),
      { rootMargin: `${AHEAD} 0px` },
    );
    watch.observe(place.current);
    return () => watch.disconnect();
  }, [isSeen, place]);
  return isSeen;
}
