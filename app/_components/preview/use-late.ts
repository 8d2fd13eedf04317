"use client";

import { useEffect, useState } from "react";

/** Ms that something must last before it is said: between two key strokes a text is seldom whole. */
const LATE = 500;

/** True when `is` has been so for a while; false at once when it is not. */
export function useLate(is: boolean): boolean {
  const [late, setLate] = useState(false);
  useEffect(() => {
    if (!is) return;
    const timer = setTimeout(() => setLate(true), LATE);
    return () => {
      clearTimeout(timer);
      setLate(false);
    };
  }, [is]);
  return is && late;
}
