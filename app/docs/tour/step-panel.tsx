"use client";

import { type ReactNode, useEffect, useRef } from "react";
import { MessageText } from "@/app/_components/editor/message-text";
import type { Step } from "./steps";

interface Props {
  readonly step: Step;
  /** Its number, from 1, and how many there are. */
  readonly number: number;
  readonly count: number;
  /** What a step offers of its own. */
  readonly children?: ReactNode;
}

/** One step: what it is about, and what to do. */
export function StepPanel({ step, number, count, children }: Props) {
  // A step that was gone to is read from its heading on; the first one comes with the page.
  const heading = useRef<HTMLHeadingElement>(null);
  const shown = useRef(step.name);
  useEffect(() => {
    if (shown.current !== step.name) heading.current?.focus();
    shown.current = step.name;
  }, [step.name]);

  return (
    <section aria-labelledby="step" className="grid max-w-3xl gap-2 py-4">
      <h2 id="step" ref={heading} tabIndex={-1} className="scroll-mt-16 text-lg outline-none">
        {step.title}{" "}
        <span className="ml-1 font-normal text-quiet text-sm">
          step {number} of {count}
          {step.needsAccount && ", with an account"}
        </span>
      </h2>
      <p className="text-quiet text-sm">
        <MessageText message={step.about} />
      </p>
      <p>
        <MessageText message={step.task} />
      </p>
      {children}
    </section>
  );
}
