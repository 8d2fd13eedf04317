import type { ComponentProps, ReactNode } from "react";
import { useId } from "react";
import { classNames } from "./class-names";

/** Class names of a box one types into or chooses from. Text stays at 16 px on small screens, so that phones do not zoom. */
export const INPUT_CLASS =
  "min-h-9 w-full min-w-0 rounded-[2px] border border-edge bg-surface px-2.5 text-base text-ink md:text-sm aria-[invalid=true]:border-broken aria-[invalid=true]:border-2";

interface FieldProps extends Omit<ComponentProps<"input">, "id"> {
  readonly label: string;
  /** Said below the box before anything went wrong. */
  readonly hint?: ReactNode;
  /** What is wrong and how to mend it; takes the place of the hint. */
  readonly error?: string | undefined;
}

/** A labelled input with its hint or its error, tied together for assistive technology. */
export function Field({ label, hint, error, className, ...input }: FieldProps) {
  const id = useId();
  const noteId = `${id}-note`;
  const note = error ?? hint;
  return (
    <div className={classNames("grid gap-1.5", className)}>
      <label htmlFor={id} className="font-semibold text-sm">
        {label}
      </label>
      <input
        {...input}
        id={id}
        aria-invalid={error === undefined ? undefined : true}
        aria-describedby={note === undefined ? undefined : noteId}
        className={INPUT_CLASS}
      />
      {note !== undefined && (
        <p
          id={noteId}
          className={classNames("text-[0.8125rem]", error === undefined ? "text-quiet" : "text-broken")}
        >
          {note}
        </p>
      )}
    </div>
  );
}

interface SelectFieldProps extends Omit<ComponentProps<"select">, "id"> {
  readonly label: string;
  /** Keeps the label for assistive technology only, where the place says what is chosen. */
  readonly labelHidden?: boolean;
}

/** A labelled native select; its options are the children. */
export function SelectField({ label, labelHidden = false, className, ...select }: SelectFieldProps) {
  const id = useId();
  return (
    <div className={classNames("grid gap-1.5", className)}>
      <label htmlFor={id} className={labelHidden ? "sr-only" : "font-semibold text-sm"}>
        {label}
      </label>
      <select {...select} id={id} className={INPUT_CLASS} />
    </div>
  );
}
