"use client";

import { type KeyboardEvent, type ReactNode, useEffect, useMemo, useRef, useState } from "react";
import type { Connections } from "@/lib/language/symbols/connections";
import { netsWithPins, sayBox, sayNet, standsFor } from "./chosen";
import { type Layout, pinIsNamed, type Wire } from "./layout";
import { ChipShape, FrameShape, OpenerShape, PinName, RailShape, WiresShape } from "./shapes";
import { type Direction, nextStop, type Stop, stopsOf } from "./stops";
import { useDragging } from "./use-dragging";
import { bringIntoView, pan } from "./view-moves";

interface Props {
  readonly connections: Connections;
  readonly layout: Layout;
  readonly chosen: readonly string[];
  readonly zoom: number;
  readonly onChoose: (name: string) => void;
  /** Opens a block that is closed and closes one that is open. */
  readonly onTurn: (name: string) => void;
  readonly onZoom: (steps: number) => void;
}

const DIRECTIONS: Readonly<Record<string, Direction>> = {
  ArrowLeft: "left",
  ArrowRight: "right",
  ArrowUp: "up",
  ArrowDown: "down",
};

/**
 * The drawing in a window that scrolls. One stop of the Tab key: arrow keys go from part to part, Enter chooses, + and - zoom,
 * Shift with arrows moves the drawing.
 */
export function DrawingView({ connections, layout, chosen, zoom, onChoose, onTurn, onZoom }: Props) {
  const view = useRef<HTMLDivElement>(null);
  const stops = useMemo(() => stopsOf(layout), [layout]);
  const [at, setAt] = useState<string | null>(null);
  const here = stops.find(({ id }) => id === (at ?? chosen[0])) ?? stops[0];
  const pins = useMemo(() => netsWithPins(connections), [connections]);
  useDragging(view);

  useEffect(() => {
    const first = chosen[0];
    if (first === undefined || view.current === null) return;
    const stop = stops.find(({ name }) => name === first || first.startsWith(`${name}.`));
    if (stop !== undefined) bringIntoView(view.current, stop, zoom);
  }, [chosen, stops, zoom]);

  const act = ({ does, name }: Stop) => (does === "choose" ? onChoose(name) : onTurn(name));
  const go = (stop: Stop | null | undefined) => {
    if (stop === null || stop === undefined) return;
    setAt(stop.id);
    const node = view.current?.querySelector<SVGGElement>(`[data-stop="${CSS.escape(stop.id)}"]`);
    node?.focus({ preventScroll: true });
    if (view.current !== null) bringIntoView(view.current, stop, zoom);
  };
  const press = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey || here === undefined) return;
    const direction = DIRECTIONS[event.key];
    if (direction !== undefined && event.shiftKey) pan(view.current, direction);
    else if (direction !== undefined) go(nextStop(stops, here, direction));
    else if (event.key === "Home") go(stops[0]);
    else if (event.key === "End") go(stops.at(-1));
    else if (event.key === "Enter" || event.key === " ") act(here);
    else if (event.key === "+" || event.key === "=") onZoom(1);
    else if (event.key === "-") onZoom(-1);
    else return;
    event.preventDefault();
  };
  const part = (stop: Stop | undefined, label: string, content: ReactNode, isPressed?: boolean) =>
    stop === undefined ? null : (
      <Part
        key={stop.id}
        stop={stop}
        label={label}
        isHere={stop.id === here?.id}
        isPressed={isPressed}
        onAct={act}
        onFocus={setAt}
      >
        {content}
      </Part>
    );
  const find = useMemo(() => {
    const byId = new Map(stops.map((stop) => [stop.id, stop]));
    return (id: string) => byId.get(id);
  }, [stops]);
  const boxes = useMemo(() => new Map(layout.chips.map(({ box }) => [box.name, box])), [layout]);
  const marked = new Set(chosen);
  const isChosenWire = ({ box, net }: Wire) => marked.has(box) || (net !== null && marked.has(net));
  const isMarked = (name: string) => marked.has(name);

  return (
    <div
      ref={view}
      className="h-full overflow-auto bg-surface [background-attachment:local] [background-image:linear-gradient(to_bottom,transparent_23px,var(--grid)_23px)] [background-size:100%_24px]"
    >
      {/* biome-ignore lint/a11y/useSemanticElements: a drawing is no set of fields */}
      <svg
        width={layout.width * zoom}
        height={layout.height * zoom}
        viewBox={`0 0 ${layout.width} ${layout.height}`}
        role="group"
        aria-label="Drawing of what is connected to what"
        onKeyDown={press}
        className="block font-(family-name:--font-figures)"
      >
        {layout.frames.map((frame) => (
          <g key={frame.box.name}>
            {part(
              find(frame.box.name),
              sayBox(frame.box),
              <FrameShape frame={frame} isChosen={isMarked(frame.box.name)} />,
              isMarked(frame.box.name),
            )}
            {part(
              find(`close ${frame.box.name}`),
              `Close ${frame.box.name}`,
              <OpenerShape {...middleOf(find(`close ${frame.box.name}`))} isOpen />,
            )}
          </g>
        ))}
        {layout.rails.map((rail) =>
          part(
            find(rail.net),
            sayNet(rail.net, pins.get(rail.net) ?? []),
            <RailShape rail={rail} isChosen={isMarked(rail.net)} />,
            isMarked(rail.net),
          ),
        )}
        {layout.chips.map((chip) => {
          const { name, inside } = chip.box;
          const isChosen = standsFor(chip.box, chosen, false);
          return (
            <g key={name}>
              {part(find(name), sayBox(chip.box), <ChipShape chip={chip} isChosen={isChosen} />, isChosen)}
              {inside !== null &&
                part(
                  find(`open ${name}`),
                  `Open ${name}`,
                  <OpenerShape {...middleOf(find(`open ${name}`))} isOpen={false} />,
                )}
            </g>
          );
        })}
        <g className="pointer-events-none">
          <WiresShape wires={layout.wires.filter((wire) => !isChosenWire(wire))} isChosen={false} />
          <WiresShape wires={layout.wires.filter(isChosenWire)} isChosen />
          {layout.wires.map((wire) =>
            pinIsNamed(wire, boxes.get(wire.box)!) ? (
              <PinName key={`${wire.box} ${wire.pin}`} wire={wire} />
            ) : null,
          )}
        </g>
      </svg>
    </div>
  );
}

function middleOf(stop: Stop | undefined): { x: number; y: number } {
  return { x: stop?.x ?? 0, y: stop?.y ?? 0 };
}

/** Something that can be pressed. */
function Part({
  stop,
  label,
  isHere,
  isPressed,
  onAct,
  onFocus,
  children,
}: {
  readonly stop: Stop;
  readonly label: string;
  readonly isHere: boolean;
  readonly isPressed: boolean | undefined;
  readonly onAct: (stop: Stop) => void;
  readonly onFocus: (id: string) => void;
  readonly children: ReactNode;
}) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: a part of a drawing cannot be a button of HTML
    <g
      role="button"
      tabIndex={isHere ? 0 : -1}
      aria-label={label}
      aria-pressed={isPressed}
      data-stop={stop.id}
      onClick={() => {
        onFocus(stop.id);
        onAct(stop);
      }}
      onFocus={() => onFocus(stop.id)}
      className="cursor-pointer outline-none focus-visible:outline-2 focus-visible:outline-accent focus-visible:outline-offset-1"
    >
      {children}
    </g>
  );
}
