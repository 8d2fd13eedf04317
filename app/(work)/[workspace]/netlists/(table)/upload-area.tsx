"use client";

import { type ReactNode, useRef, useState } from "react";
import { Button } from "@/app/_components/ui/button";
import { type FileResult, sendFile } from "./send-file";
import { UploadResults } from "./upload-results";

interface Props {
  readonly workspace: string;
  readonly mayWrite: boolean;
  /** After the last file, when at least one became a netlist. */
  readonly onAdded: () => void;
  /** Gets the button that opens the file chooser, and what became of the files. */
  readonly children: (button: ReactNode, report: ReactNode) => ReactNode;
}

/** Takes `.swn` files by choice or by drop on any part of the page, one after another, and says what became of each. */
export function UploadArea({ workspace, mayWrite, onAdded, children }: Props) {
  const chooser = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const [results, setResults] = useState<readonly FileResult[]>([]);
  const sending = results.some((result) => result.state === "waiting");

  const send = async (files: readonly File[]) => {
    if (files.length === 0 || sending) return;
    setResults(files.map((file) => ({ name: file.name, state: "waiting" })));
    let added = false;
    for (const [index, file] of files.entries()) {
      const result = await sendFile(workspace, file);
      added ||= result.state === "added";
      setResults((before) => before.map((old, at) => (at === index ? result : old)));
    }
    if (added) onAdded();
  };

  if (!mayWrite) return children(null, null);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is the mouse's twin of the button, which the keyboard has
    <div
      className="relative grow"
      onDragOver={(event) => {
        if (!event.dataTransfer.types.includes("Files")) return;
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget as Node | null)) setOver(false);
      }}
      onDrop={(event) => {
        event.preventDefault();
        setOver(false);
        void send([...event.dataTransfer.files]);
      }}
    >
      {children(
        <>
          <input
            ref={chooser}
            type="file"
            accept=".swn,text/plain"
            multiple
            hidden
            data-testid="upload-chooser"
            onChange={(event) => {
              void send([...(event.target.files ?? [])]);
              event.target.value = "";
            }}
          />
          <Button busy={sending} onClick={() => chooser.current?.click()}>
            {sending ? "Uploading…" : "Upload .swn files"}
          </Button>
        </>,
        results.length > 0 && (
          <UploadResults workspace={workspace} results={results} onClose={() => setResults([])} />
        ),
      )}
      {over && (
        <div className="pointer-events-none absolute inset-2 z-30 flex items-center justify-center rounded-[2px] border-2 border-accent border-dashed bg-paper/90">
          <p className="font-semibold">Drop .swn files to add them as netlists</p>
        </div>
      )}
    </div>
  );
}
