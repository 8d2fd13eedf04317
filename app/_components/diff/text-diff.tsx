"use client";

import { useEffect, useId, useMemo, useRef, useState, useSyncExternalStore } from "react";
import { linesOf as colouredLines } from "../editor/plain-lines";
import { Button, Keys } from "../ui/button";
import { counted } from "../ui/count";
import { DiffTable, type Shown } from "./diff-table";
import { changesIn, foldsOf } from "./folds";
import { diffTexts } from "./line-diff";

/** How two texts stand: beside one another, or one line under the other. */
export type DiffForm = "beside" | "inline";

interface Props {
  readonly before: { readonly text: string; readonly label: string };
  readonly after: { readonly text: string; readonly label: string };
  /** Null: as the width of the window allows. */
  readonly form: DiffForm | null;
  readonly onForm: (form: DiffForm) => void;
}

/** Rows shown at once; a text that changed wholly is shown in parts. */
const AT_ONCE = 2_000;

/** Two texts line by line with the words that differ marked; what did not change is folded; Alt with the arrows goes from change to change. */
export function TextDiff({ before, after, form: asked, onForm }: Props) {
  const id = useId();
  const isWide = useSyncExternalStore(watchWidth, widthNow, () => true);
  const form = asked ?? (isWide ? "beside" : "inline");
  const place = useRef<HTMLDivElement>(null);
  const [unfolded, setUnfolded] = useState<ReadonlySet<number>>(new Set());
  const [most, setMost] = useState(AT_ONCE);
  const [here, setHere] = useState(-1);
  const rows = useMemo(() => diffTexts(before.text, after.text), [before.text, after.text]);
  const coloured = useMemo(
    () => ({ before: colouredLines(before.text), after: colouredLines(after.text) }),
    [before.text, after.text],
  );
  const changes = useMemo(() => changesIn(rows), [rows]);
  const shown = useMemo(() => {
    const list: Shown[] = [];
    for (const { from, to, isFolded } of foldsOf(rows)) {
      if (isFolded && !unfolded.has(from)) list.push({ fold: from, count: to - from });
      else for (let row = from; row < to; row += 1) list.push({ row });
    }
    return list;
  }, [rows, unfolded]);

  const go = (step: 1 | -1) => {
    const next = Math.min(changes.length - 1, Math.max(0, here + step));
    const row = changes[next];
    if (row === undefined) return;
    setHere(next);
    const index = shown.findIndex((one) => "row" in one && one.row === row);
    if (index >= most) setMost(index + AT_ONCE);
    requestAnimationFrame(() => {
      const target = place.current?.querySelector<HTMLElement>(`[data-row="${row}"]`);
      target?.scrollIntoView({ block: "center" });
      target?.focus({ preventScroll: true });
    });
  };

  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (!event.altKey || event.ctrlKey || event.metaKey || event.shiftKey) return;
      if (event.key !== "ArrowDown" && event.key !== "ArrowUp") return;
      event.preventDefault();
      go(event.key === "ArrowDown" ? 1 : -1);
    };
    window.addEventListener("keydown", press);
    return () => window.removeEventListener("keydown", press);
  });

  return (
    <div ref={place} className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2" data-print="never">
        <p role="status" className="text-quiet text-sm">
          {changes.length === 0
            ? "No line differs"
            : here === -1
              ? counted(changes.length, "change")
              : `Change ${here + 1} of ${changes.length}`}
        </p>
        {changes.length > 0 && (
          <div className="flex gap-2">
            <Button size="small" onClick={() => go(-1)} disabled={here <= 0}>
              Previous change <Keys>Alt ↑</Keys>
            </Button>
            <Button size="small" onClick={() => go(1)} disabled={here === changes.length - 1}>
              Next change <Keys>Alt ↓</Keys>
            </Button>
          </div>
        )}
        <fieldset className="ml-auto flex items-center gap-3 text-sm">
          <legend className="sr-only">How the texts stand</legend>
          {(["beside", "inline"] as const).map((one) => (
            <label key={one} className="flex min-h-7 items-center gap-1.5">
              <input
                type="radio"
                name={`${id}-form`}
                checked={form === one}
                onChange={() => onForm(one)}
                className="size-4 accent-(--accent)"
              />
              {one === "beside" ? "side by side" : "in one column"}
            </label>
          ))}
        </fieldset>
      </div>
      <DiffTable
        rows={rows}
        shown={shown.slice(0, most)}
        coloured={coloured}
        labels={[before.label, after.label]}
        form={form}
        onUnfold={(fold) => setUnfolded(new Set([...unfolded, fold]))}
      />
      {shown.length > most && (
        <Button className="justify-self-start" onClick={() => setMost(most + AT_ONCE)}>
          Show {counted(Math.min(AT_ONCE, shown.length - most), "more line")}
        </Button>
      )}
    </div>
  );
}

const WIDE = "(min-width: 768px)";

function watchWidth(change: () => void): () => void {
  const query = matchMedia(WIDE);
  query.addEventListener("change", change);
  return () => query.removeEventListener("change", change);
}

function widthNow(): boolean {
  return matchMedia(WIDE).matches;
}
