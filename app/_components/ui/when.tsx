"use client";

import { useSyncExternalStore } from "react";

const never = () => () => {};

/** "1 Dec 2026, 07:47", or "today, 07:47" on the reader's own day. */
function localText(iso: string): string {
  const at = new Date(iso);
  const time = at.toLocaleTimeString("en-GB", { hour: "2-digit", minute: "2-digit" });
  if (at.toDateString() === new Date().toDateString()) return `today, ${time}`;
  return `${at.toLocaleDateString("en-GB", { day: "numeric", month: "short", year: "numeric" })}, ${time}`;
}

/** A moment in the reader's own time zone; the server, which does not know it, writes it in UTC and says so. */
export function When({ iso }: { readonly iso: string }) {
  const text = useSyncExternalStore(
    never,
    () => localText(iso),
    () => `${iso.slice(0, 10)} ${iso.slice(11, 16)} UTC`,
  );
  return (
    <time dateTime={iso} title={iso} className="whitespace-nowrap">
      {text}
    </time>
  );
}
