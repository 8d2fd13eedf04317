"use client";

import { useRouter } from "next/navigation";
import { useEffect } from "react";

/** Asks for the page anew every two seconds while work is running and the page is looked at. Draws nothing. */
export function KeepCurrent({ moving }: { readonly moving: boolean }) {
  const router = useRouter();
  useEffect(() => {
    if (!moving) return;
    const timer = setInterval(() => {
      if (document.visibilityState === "visible") router.refresh();
    }, 2000);
    return () => clearInterval(timer);
  }, [moving, router]);
  return null;
}
