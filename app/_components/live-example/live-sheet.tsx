"use client";

import { type ReactNode, useState } from "react";
import { LateConnections } from "@/app/_components/drawing/late-connections";
import { Tabs } from "@/app/_components/ui/tabs";
import { LivePreview } from "./live-preview";
import { LiveText } from "./live-text";
import type { Live } from "./use-live";
import { useWhole } from "./use-whole";
import { WholeView } from "./whole-view";

interface Props {
  readonly live: Live;
  /** A whole plan that somebody else listens to; its own where there is none. */
  readonly solving?: ReturnType<typeof useWhole>;
  /** The text as it was given, rendered by the server. */
  readonly children: ReactNode;
}

/**
 * A whole sheet inside a page of the reference: the text, and beside it the preview with its knobs, the whole plan when asked for,
 * and the drawing of its connections.
 */
export function LiveSheet({ live, solving, children }: Props) {
  const own = useWhole();
  const { whole, start, stop } = solving ?? own;
  const [tab, setTab] = useState("preview");
  const run = () => start(live.text);
  return (
    <div className="@container min-w-0 border-y" data-live-sheet>
      <div className="grid @4xl:grid-cols-2">
        <div className="flex min-h-[26rem] min-w-0 flex-col border-b @4xl:sticky @4xl:top-0 @4xl:h-[max(32rem,calc(100dvh-2rem))] @4xl:border-r @4xl:border-b-0">
          <LiveText live={live} onRun={run}>
            {children}
          </LiveText>
        </div>
        <div className="min-w-0 py-2 @4xl:pl-6">
          <Tabs
            label="Beside the text"
            value={tab}
            onChange={setTab}
            tabs={[
              {
                value: "preview",
                label: "Preview",
                content: (
                  <>
                    <LivePreview live={live} isSeen />
                    <WholeView whole={whole} text={live.text} onStart={run} onStop={stop} />
                  </>
                ),
              },
              {
                value: "connections",
                label: "Connections",
                content: <LateConnections text={live.text} cursor={live.cursor} editor={live.editor} />,
              },
            ]}
          />
        </div>
      </div>
    </div>
  );
}
