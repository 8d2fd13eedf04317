"use client";

import { useEffect, useMemo, useRef, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { counted } from "@/app/_components/ui/count";
import type { Span } from "@/lib/language/span";
import type { Connections } from "@/lib/language/symbols/connections";
import { allBoxes, spanOf } from "./chosen";
import { ChosenWords } from "./chosen-words";
import { ConnectionList } from "./connection-list";
import { DrawingView } from "./drawing-view";
import { layOutConnections } from "./layout";

/** Zooms that the buttons and keys step through. */
const ZOOMS = [0.06, 0.1, 0.17, 0.25, 0.35, 0.5, 0.7, 0.85, 1, 1.25, 1.5, 2, 3] as const;
const USUAL = 8;
/** The smallest in which everything can be read without leaning forward: what a drawing that is too wide begins with. */
const READABLE = 7;

interface Props {
  /** Null while the text is being read. */
  readonly connections: Connections | null;
  /** Names of boxes and nets that are marked, dotted from the file. */
  readonly chosen: readonly string[];
  /** Something was chosen in the drawing; `span` is where the text says what it is. */
  readonly onChoose: (name: string, span: Span | null) => void;
}

/** What is connected to what: a drawing, or the same as a list. What is chosen is told of in words below it. */
export function ConnectionDrawing({ connections, chosen, onChoose }: Props) {
  const [open, setOpen] = useState<ReadonlySet<string>>(new Set());
  const [zoom, setZoom] = useState<number>(USUAL);
  const [isList, setIsList] = useState(false);
  const rows = connections?.rows ?? [];
  const begun = useRef(0);
  const [took, setTook] = useState<{ readonly of: object; readonly ms: number } | null>(null);
  const layout = useMemo(() => {
    begun.current = performance.now();
    return layOutConnections(connections?.rows ?? [], open);
  }, [connections, open]);
  const body = useRef<HTMLDivElement>(null);
  const isDrawn = layout.chips.length > 0;
  const fitting = () => {
    const room = body.current?.getBoundingClientRect();
    if (room === undefined) return USUAL;
    const fits = (zoom: number) => layout.width * zoom <= room.width && layout.height * zoom <= room.height;
    return Math.max(0, ZOOMS.slice(0, USUAL + 1).findLastIndex(fits));
  };
  // biome-ignore lint/correctness/useExhaustiveDependencies: once, when the first drawing is there
  useEffect(() => {
    if (isDrawn) setZoom(Math.max(fitting(), READABLE));
  }, [isDrawn]);
  useEffect(() => setTook({ of: layout, ms: performance.now() - begun.current }), [layout]);

  if (connections === null) return <p className="border-y py-3 text-quiet text-sm">Reading the text…</p>;
  if (rows.length === 0) {
    return (
      <p className="border-y py-3 text-quiet text-sm">Nothing is wired yet, so there is nothing to draw.</p>
    );
  }
  const boxes = allBoxes(rows);
  const blocks = boxes.filter(({ inside }) => inside !== null).map(({ name }) => name);
  const step = (steps: number) => setZoom((now) => Math.min(Math.max(now + steps, 0), ZOOMS.length - 1));
  const turn = (name: string) =>
    setOpen((now) => new Set(now.has(name) ? [...now].filter((one) => one !== name) : [...now, name]));
  const choose = (name: string) => onChoose(name, spanOf(connections, name));

  return (
    <div className="flex h-full min-h-80 flex-col border">
      <div className="flex shrink-0 flex-wrap items-center gap-1 border-b bg-paper px-2 py-1">
        <Button size="small" tone="quiet" aria-pressed={isList} onClick={() => setIsList(!isList)}>
          {isList ? "Show drawing" : "Show as list"}
        </Button>
        {!isList && (
          <>
            <Button
              size="small"
              tone="quiet"
              aria-label="Smaller"
              onClick={() => step(-1)}
              disabled={zoom === 0}
            >
              −
            </Button>
            <Button
              size="small"
              tone="quiet"
              aria-label="Larger"
              onClick={() => step(1)}
              disabled={zoom === ZOOMS.length - 1}
            >
              +
            </Button>
            <Button
              size="small"
              tone="quiet"
              aria-label={`Size ${Math.round(ZOOMS[zoom]! * 100)} %, back to 100 %`}
              onClick={() => setZoom(USUAL)}
            >
              {Math.round(ZOOMS[zoom]! * 100)} %
            </Button>
            <Button size="small" tone="quiet" onClick={() => setZoom(fitting())}>
              Whole
            </Button>
            {blocks.length > 0 && (
              <Button
                size="small"
                tone="quiet"
                onClick={() => setOpen(new Set(open.size === 0 ? blocks : []))}
              >
                {open.size === 0 ? "Open all blocks" : "Close all blocks"}
              </Button>
            )}
          </>
        )}
        <p className="figures ml-auto text-quiet text-xs">
          {counted(boxes.length - blocks.length, "element")}, {counted(connections.nets.size, "net")}
          {took?.of === layout && `, drawn in ${took.ms < 10 ? took.ms.toFixed(1) : Math.round(took.ms)} ms`}
        </p>
      </div>
      <div ref={body} className="min-h-0 grow">
        {isList ? (
          <ConnectionList connections={connections} chosen={chosen} onChoose={choose} />
        ) : (
          <DrawingView
            connections={connections}
            layout={layout}
            chosen={chosen}
            zoom={ZOOMS[zoom]!}
            onChoose={choose}
            onTurn={turn}
            onZoom={step}
          />
        )}
      </div>
      <ChosenWords connections={connections} chosen={chosen} onChoose={choose} />
    </div>
  );
}
