import Link from "next/link";
import type { ComponentProps } from "react";
import { classNames } from "./class-names";

/** `primary` once a page at most; `quiet` inside rows and bars. There is no tone for what cannot be undone: nothing is offered that cannot. */
export type ButtonTone = "primary" | "plain" | "quiet";
export type ButtonSize = "regular" | "small";

const TONES: Record<ButtonTone, string> = {
  primary: "border-ink bg-ink text-paper hover:opacity-90",
  plain: "border-rule bg-surface text-ink hover:border-edge",
  quiet: "border-transparent bg-transparent text-ink hover:bg-wash",
};

const SIZES: Record<ButtonSize, string> = {
  regular: "min-h-9 px-3.5 text-sm",
  small: "min-h-7 px-2 text-[0.8125rem]",
};

/** Class names of a button, for elements that are buttons by another component's doing (a menu trigger, a file label). */
export function buttonClass(tone: ButtonTone = "plain", size: ButtonSize = "regular"): string {
  return classNames(
    "inline-flex shrink-0 items-center justify-center gap-2 whitespace-nowrap rounded-[2px] border font-semibold",
    "disabled:opacity-55 aria-disabled:opacity-55",
    TONES[tone],
    SIZES[size],
  );
}

interface Style {
  readonly tone?: ButtonTone;
  readonly size?: ButtonSize;
}

/** A button. While `busy` it keeps its words and its focus, says so to assistive technology, and takes no press. */
export function Button({
  tone = "plain",
  size = "regular",
  busy = false,
  className,
  type = "button",
  onClick,
  "aria-disabled": held,
  ...rest
}: ComponentProps<"button"> & Style & { readonly busy?: boolean }) {
  return (
    <button
      {...rest}
      type={busy && type === "submit" ? "button" : type}
      aria-disabled={busy || held}
      aria-busy={busy || undefined}
      onClick={busy ? undefined : onClick}
      className={classNames(buttonClass(tone, size), className)}
    />
  );
}

/** A link in the shape of a button. */
export function ButtonLink({
  tone = "plain",
  size = "regular",
  className,
  ...rest
}: ComponentProps<typeof Link> & Style) {
  return <Link {...rest} className={classNames(buttonClass(tone, size), className)} />;
}

/** The keys that do the same as a button, written inside it; hidden where there is no keyboard to speak of. */
export function Keys({ children }: { readonly children: string }) {
  return (
    <span aria-hidden="true" className="figures hidden font-normal text-xs opacity-75 md:inline">
      {children}
    </span>
  );
}
