"use client";

import { useEffect, useState } from "react";
import { counted } from "@/app/_components/ui/count";
import type { Preview } from "./previewing";
import { countRow } from "./row-words";

/** Ms of rest before anything is said: typing and turning are not to be talked into. */
const REST = 1500;

/** Says, when things have come to rest, what of the preview has changed in kind: verdicts, failures, errors; never each value. */
export function SpokenPreview({ preview }: { readonly preview: Preview }) {
  const [text, setText] = useState("");
  const said = inWords(preview);
  useEffect(() => {
    if (said === null) return;
    const timer = setTimeout(() => setText(said), REST);
    return () => clearTimeout(timer);
  }, [said]);
  return (
    <p className="sr-only" aria-live="polite" data-spoken-preview>
      {text}
    </p>
  );
}

function inWords({ state, row, isStale }: Preview): string | null {
  if (state === "wrong") return row === null ? null : "The preview stays at the text before its errors.";
  if (row === null || isStale) return null;
  const { failed } = countRow(row);
  const of = (verdict: string) =>
    row.requirements.filter((one) => one.verdict === verdict).map(({ label }) => label);
  const broken = of("broken");
  const parts = [
    ...(failed === 0 ? [] : [`${counted(failed, "point")} failed`]),
    ...(broken.length === 0 ? [] : [`broken: ${broken.join(", ")}`]),
  ];
  if (parts.length > 0) return `Preview: ${parts.join("; ")}.`;
  return row.requirements.length === 0 ? "Preview solved." : "Preview: all requirements judged here hold.";
}
