"use client";

import { useState } from "react";
import type { TabDoes } from "@/app/_components/editor/editor-handle";
import { isApple } from "@/app/_components/editor/keyboard";
import { NetlistEditor } from "@/app/_components/editor/netlist-editor";
import { ProblemList } from "@/app/_components/editor/problem-list";
import { useExamination } from "@/app/_components/editor/use-examination";
import { counted } from "@/app/_components/ui/count";
import type { Live } from "./use-live";

interface Props {
  readonly live: Live;
  readonly onRun: (() => void) | undefined;
}

const nothing = () => {};

/** The editor of an example with the problems of its text below it. Its thread checks the text as one types. */
export function LiveEditor({ live, onRun = nothing }: Props) {
  const { editor, text, previewing } = live;
  const { examined, newest } = useExamination(text);
  const [tab, setTab] = useState<TabDoes>("indents");
  const problems = examined?.diagnostics ?? [];
  return (
    <div className="absolute inset-0 flex flex-col">
      <div className="min-h-0 grow">
        <NetlistEditor
          ref={editor}
          initial={text}
          readOnly={false}
          problems={newest}
          onEdit={live.edited}
          onArrive={live.arrived}
          onQueue={onRun}
          onSave={nothing}
          onTab={setTab}
          onCursor={(offset, names) => live.rest({ offset, names })}
          valueAtCursor={previewing.valueAt}
        />
      </div>
      {examined !== null && problems.length > 0 && (
        <ProblemList
          text={examined.text}
          diagnostics={problems}
          mayMend
          onGoTo={(problem) => editor.current?.goTo(problem)}
          onMend={(problem) => problem.fix !== undefined && editor.current?.mend(problem.fix, examined.text)}
        />
      )}
      <div className="figures flex shrink-0 flex-wrap justify-between gap-x-4 border-t bg-paper px-4 py-1 text-quiet text-xs">
        <p role="status">{inWords(examined === null ? null : problems)}</p>
        <p aria-live="polite">{tabInWords(tab)}</p>
      </div>
    </div>
  );
}

function inWords(problems: readonly { readonly severity: string }[] | null): string {
  if (problems === null) return "checking…";
  const errors = problems.filter(({ severity }) => severity === "error").length;
  const warnings = problems.length - errors;
  if (problems.length === 0) return "no problems";
  const found = [
    ...(errors === 0 ? [] : [`${counted(errors, "error")} to mend`]),
    ...(warnings === 0 ? [] : [counted(warnings, "warning")]),
  ];
  return found.join(", ");
}

/** The way out of the editor for the Tab key. */
function tabInWords(tab: TabDoes): string {
  if (tab === "always moves on") return "Tab always moves on";
  const key = isApple() ? "Ctrl Shift M" : "Ctrl M";
  return `Tab ${tab}; ${key} lets it ${tab === "indents" ? "move on" : "indent"}`;
}
