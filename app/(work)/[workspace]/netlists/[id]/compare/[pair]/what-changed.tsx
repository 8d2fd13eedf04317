import type { ComponentProps } from "react";
import { ChangeList } from "../../change-list";

/** The first part of a comparison: what changed, in words. Its heading is `changed`, by which its section is named. */
export function WhatChanged(props: ComponentProps<typeof ChangeList>) {
  return (
    <>
      <h2 id="changed" className="caption">
        What changed
      </h2>
      <div className="mt-2">
        <ChangeList {...props} />
      </div>
    </>
  );
}
