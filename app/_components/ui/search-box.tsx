"use client";

import { useEffect, useRef, useState } from "react";
import { INPUT_CLASS } from "./field";

/** Hands on what is typed once the typing rests for a fifth of a second; Escape empties the box. */
export function SearchBox({
  label,
  value,
  onChange,
}: {
  readonly label: string;
  readonly value: string;
  readonly onChange: (query: string) => void;
}) {
  const [text, setText] = useState(value);
  const sent = useRef(value);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);

  useEffect(() => {
    // Only a change from outside (back, "show all") overwrites what is being typed.
    if (value !== sent.current) {
      sent.current = value;
      setText(value);
    }
  }, [value]);
  useEffect(() => () => clearTimeout(timer.current), []);

  const type = (next: string) => {
    setText(next);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => {
      sent.current = next.trim();
      onChange(next.trim());
    }, 200);
  };

  return (
    <search className="max-w-md">
      <input
        type="search"
        aria-label={label}
        placeholder={label}
        value={text}
        maxLength={200}
        onChange={(event) => type(event.target.value)}
        onKeyDown={(event) => event.key === "Escape" && type("")}
        className={INPUT_CLASS}
      />
    </search>
  );
}
