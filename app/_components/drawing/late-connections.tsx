"use client";

import dynamic from "next/dynamic";

/** The drawing of what a text connects, fetched when it is first looked at. */
export const LateConnections = dynamic(
  () => import("./text-connections").then((all) => all.TextConnections),
  {
    ssr: false,
    loading: () => <p className="border-y py-3 text-quiet text-sm">The drawing is coming…</p>,
  },
);
