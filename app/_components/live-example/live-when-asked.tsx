"use client";

import dynamic from "next/dynamic";
import { type ReactNode, useEffect, useRef, useState } from "react";
import { PlainLines } from "@/app/_components/editor/plain-lines";
import { Button } from "@/app/_components/ui/button";

const LiveBox = dynamic(() => import("./live-box").then((all) => all.LiveBox), {
  ssr: false,
  loading: () => (
    <p className="my-6 border bg-paper px-4 py-2 text-quiet text-sm">The live sheet is coming…</p>
  ),
});

interface Props {
  /** The whole netlist, also where the page shows a part of it. */
  readonly text: string;
  /** What the example shows, in a few words. */
  readonly title: string;
  /** The example to read, as the server has rendered it. */
  readonly children: ReactNode;
}

/** An example to read that becomes a live one in its place when asked: a page of dozens stays light, and each can still be tried. */
export function LiveWhenAsked({ text, title, children }: Props) {
  const [isAsked, setAsked] = useState(false);
  const place = useRef<HTMLDivElement>(null);
  // The button that was pressed is gone: the keyboard goes on from what has taken its place.
  useEffect(() => {
    if (isAsked) place.current?.focus();
  }, [isAsked]);
  if (isAsked)
    return (
      <div ref={place} tabIndex={-1} className="outline-none">
        <LiveBox text={text} title={title} hasKnobs={/^knob /mu.test(text)}>
          <PlainLines text={text} label={`Netlist text: ${title}`} />
        </LiveBox>
      </div>
    );
  return (
    <div className="mt-3">
      {children}
      <p className="mt-1.5 print:hidden">
        <Button size="small" aria-label={`Try it here: ${title}`} onClick={() => setAsked(true)}>
          Try it here
        </Button>
      </p>
    </div>
  );
}
