"use client";

import { type RefObject, useEffect } from "react";

/** Pixels that the pointer may stray while it presses a part. */
const STRAY = 4;

/** Lets a mouse move what a window shows by dragging it; fingers scroll as everywhere. A drag presses nothing. */
export function useDragging(box: RefObject<HTMLElement | null>): void {
  useEffect(() => {
    const node = box.current;
    if (node === null) return;
    let from: { x: number; y: number; left: number; top: number } | null = null;
    let moved = false;
    const down = (event: PointerEvent) => {
      if (event.pointerType !== "mouse" || event.button !== 0) return;
      from = { x: event.clientX, y: event.clientY, left: node.scrollLeft, top: node.scrollTop };
      moved = false;
    };
    const move = (event: PointerEvent) => {
      if (from === null) return;
      const [dx, dy] = [event.clientX - from.x, event.clientY - from.y];
      if (Math.hypot(dx, dy) > STRAY) moved = true;
      if (moved) node.scrollTo({ left: from.left - dx, top: from.top - dy });
    };
    const up = () => {
      from = null;
    };
    const click = (event: MouseEvent) => {
      if (moved) event.stopPropagation();
      moved = false;
    };
    node.addEventListener("pointerdown", down);
    node.addEventListener("click", click, true);
    window.addEventListener("pointermove", move);
    window.addEventListener("pointerup", up);
    return () => {
      node.removeEventListener("pointerdown", down);
      node.removeEventListener("click", click, true);
      window.removeEventListener("pointermove", move);
      window.removeEventListener("pointerup", up);
    };
  }, [box]);
}
