"use client";

import { useEffect, useState } from "react";
import { type JumpEntry, outlineJumps, placeJumps } from "./jump-entries";
import { language } from "./language-thread";
import type { Told } from "./questions";

/** A list that is open over the text; `entries` is null while they are being found. */
export interface Jumps {
  readonly label: string;
  readonly entries: readonly JumpEntry[] | null;
  readonly empty: string;
}

/** The list to jump from, of which one is open at a time: the outline of a text, or the places of a name. */
export function useJumps(): {
  readonly jumps: Jumps | null;
  readonly openOutline: (text: string) => void;
  readonly openPlaces: (text: string, told: Told | null) => void;
  readonly close: () => void;
} {
  const [jumps, setJumps] = useState<Jumps | null>(null);
  useEffect(() => language.open(), []);

  const openOutline = (text: string) => {
    const shown = { label: "Outline", empty: "The text declares nothing yet." };
    setJumps({ ...shown, entries: null });
    void language.ask("outline", text, {}).then((outline) => {
      setJumps((now) =>
        now?.label === shown.label ? { ...shown, entries: outlineJumps(text, outline) } : now,
      );
    });
  };

  const openPlaces = (text: string, told: Told | null) => {
    const first = told?.places[0];
    const name = first === undefined ? "" : text.slice(first.from, first.to);
    const entries = placeJumps(text, name, told?.places ?? []);
    setJumps({ label: "Places", entries, empty: "The cursor stands on no name." });
  };

  return { jumps, openOutline, openPlaces, close: () => setJumps(null) };
}
