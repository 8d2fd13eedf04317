"use client";

import { Button } from "@/app/_components/ui/button";
import { Notice } from "@/app/_components/ui/notice";
import type { Opened } from "./open-action";
import { useOpening } from "./use-opening";

interface Props {
  readonly text: string;
  readonly onMade: (made: Extract<Opened, { is: "made" }>) => void;
}

/** "Open in my workspace", with what is in its way. */
export function OpenButton({ text, onMade }: Props) {
  const { open, isOpening, problem, rooms } = useOpening(onMade);
  return (
    <div className="grid justify-items-start gap-2">
      <Button tone="primary" busy={isOpening} onClick={() => open(text)}>
        {isOpening ? "Opening…" : "Open in my workspace"}
      </Button>
      {rooms.length > 0 && (
        <fieldset className="flex flex-wrap gap-2">
          <legend className="mb-1 text-quiet text-sm">Which workspace is it for?</legend>
          {rooms.map(({ slug, name }) => (
            <Button key={slug} size="small" busy={isOpening} onClick={() => open(text, slug)}>
              {name}
            </Button>
          ))}
        </fieldset>
      )}
      {problem !== null && (
        <Notice tone="broken" title="It was not opened" announce>
          <p>{problem}</p>
        </Notice>
      )}
    </div>
  );
}
