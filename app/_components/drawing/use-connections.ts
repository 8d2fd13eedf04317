"use client";

import { useEffect, useState } from "react";
import { language } from "@/app/_components/editor/language-thread";
import type { Connections } from "@/lib/language/symbols/connections";

/** What a text connects, read in a thread of the browser; that of an earlier text until it is read, null until the first is. */
export function useConnections(text: string): Connections | null {
  const [connections, setConnections] = useState<Connections | null>(null);
  useEffect(() => language.open(), []);
  useEffect(() => {
    let isWanted = true;
    void language.ask("connections", text, {}).then((answer) => {
      if (isWanted) setConnections(answer);
    });
    return () => {
      isWanted = false;
    };
  }, [text]);
  return connections;
}
