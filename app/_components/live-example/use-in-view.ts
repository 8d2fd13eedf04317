"use client";

import { type RefObject, useEffect, useState } from "react";

/** Px below and above the window within which something counts as near: it is to be ready when one comes to it. */
const AHEAD = "300px";

/** Whether an element is near the window, and whether it ever was. */
export function useInView(place: RefObject<Element | null>): {
  readonly isNear: boolean;
  readonly wasNear: boolean;
} {
  const [view, setView] = useState({ isNear: false, wasNear: false });
  useEffect(() => {
    if (place.current === null) return;
    const watch = new IntersectionObserver(
      (entries) => {
        const isNear = entries.at(-1)?.isIntersecting ?? false;
        setView((before) => ({ isNear, wasNear: before.wasNear || isNear }));
      },
      { rootMargin: `${AHEAD} 0px` },
    );
    watch.observe(place.current);
    return () => watch.disconnect();
  }, [place]);
  return view;
}
