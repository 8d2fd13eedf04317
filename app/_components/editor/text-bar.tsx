"use client";

import { useRef } from "react";
import { buttonClass } from "@/app/_components/ui/button";
import { Menu, MenuItem, MenuLabel, MenuSeparator } from "@/app/_components/ui/menu";
import type { TextCommand } from "./editor-handle";
import { isApple } from "./keyboard";
import { MessageText } from "./message-text";
import type { Told } from "./questions";

/** What the menu of the text can do: a command of the editor, or a list that opens over it. */
export type BarCommand = TextCommand | "outline" | "format";

type Entry = readonly [command: BarCommand, label: string, keys: string];

const READING: readonly Entry[] = [
  ["tell", "Tell what stands here", "F1"],
  ["definition", "Go to where it is declared", "F12"],
  ["places", "List its places", "Shift F12"],
  ["find", "Find", "Ctrl F"],
  ["fold all", "Fold everything", ""],
  ["unfold all", "Unfold everything", ""],
];
const WRITING: readonly Entry[] = [
  ["complete", "Complete", "Ctrl Space"],
  ["mend here", "Mend what is wrong here", "Ctrl ."],
  ["rename", "Rename", "F2"],
  ["comment", "Comment or uncomment", "Ctrl /"],
  ["format", "Format", "Shift Alt F"],
];

interface Props {
  /** What the cursor stands on. */
  readonly told: Told | null;
  readonly readOnly: boolean;
  /** A plain box has the outline alone. */
  readonly state: "coming" | "here" | "missing";
  readonly onRun: (command: BarCommand) => void;
}

/** Over the text: what the cursor stands on, the outline, and everything that keys do in the text, for those without them. */
export function TextBar({ told, readOnly, state, onRun }: Props) {
  const pending = useRef<BarCommand | null>(null);
  const item = (entry: Entry) => (
    <BarItem
      key={entry[0]}
      entry={entry}
      onSelect={() => {
        pending.current = entry[0];
      }}
    />
  );
  return (
    <div className="flex min-h-9 shrink-0 items-center gap-1 border-b bg-paper pr-2 pl-4 md:pl-6">
      <p className="figures min-w-0 grow truncate text-quiet text-xs">
        {told !== null && <MessageText message={told.lines[0] ?? ""} />}
      </p>
      <button
        type="button"
        disabled={state === "coming"}
        className={buttonClass("quiet", "small")}
        onClick={() => onRun("outline")}
      >
        Outline
      </button>
      <Menu
        trigger={
          <button type="button" disabled={state !== "here"} className={buttonClass("quiet", "small")}>
            Text
          </button>
        }
        onClosed={(event) => {
          if (pending.current === null) return;
          event.preventDefault();
          onRun(pending.current);
          pending.current = null;
        }}
      >
        {!readOnly && WRITING.map(item)}
        {!readOnly && <MenuSeparator />}
        <MenuLabel>In the text</MenuLabel>
        {READING.map(item)}
      </Menu>
    </div>
  );
}

/** Rendered once the menu is open, so in a browser only, where the keyboard is known. */
function BarItem({
  entry: [, label, keys],
  onSelect,
}: {
  readonly entry: Entry;
  readonly onSelect: () => void;
}) {
  return (
    <MenuItem onSelect={onSelect}>
      <span className="grow">{label}</span>
      <span className="figures text-quiet text-xs">{isApple() ? keys.replace("Ctrl", "⌘") : keys}</span>
    </MenuItem>
  );
}
