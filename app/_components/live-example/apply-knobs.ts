import type { WrittenKnob } from "@/app/_components/preview/write-knobs";

/** What gives knobs other values in a text; null where it cannot. The parser that it takes is fetched when it is first needed. */
export async function applyKnobs(knobs: readonly WrittenKnob[]): Promise<(text: string) => string | null> {
  const { writeKnobs } = await import("@/app/_components/preview/write-knobs");
  return (text) => {
    const change = writeKnobs(text, knobs);
    return change === null ? null : text.slice(0, change.from) + change.text + text.slice(change.to);
  };
}
