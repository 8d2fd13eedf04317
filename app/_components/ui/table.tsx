import type { ComponentProps } from "react";
import { classNames } from "./class-names";

/** A ruled table. Give it a caption (it may be `sr-only`); wrap it in `TableFrame` where it may be wider than its place. */
export function Table({ className, ...rest }: ComponentProps<"table">) {
  return <table {...rest} className={classNames("w-full border-collapse text-left text-sm", className)} />;
}

/** Lets a wide table scroll sideways by itself, by keyboard too; `label` names the region. Words for the ear alone scroll with it. */
export function TableFrame({
  label,
  className,
  ...rest
}: Omit<ComponentProps<"section">, "aria-label"> & { readonly label: string }) {
  const held = classNames("relative overflow-x-auto", className);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable from the keyboard
    <section {...rest} aria-label={label} tabIndex={0} className={held} />
  );
}

/** A head cell; `figure` sets it right, over numbers. */
export function HeadCell({
  figure = false,
  className,
  ...rest
}: ComponentProps<"th"> & { readonly figure?: boolean }) {
  return (
    <th
      scope="col"
      {...rest}
      className={classNames(
        "border-b py-2 pr-4 font-semibold text-[0.8125rem] text-quiet last:pr-0",
        figure && "text-right",
        className,
      )}
    />
  );
}

/** A body cell; `figure` sets a number right-aligned in tabular figures. */
export function Cell({
  figure = false,
  className,
  ...rest
}: ComponentProps<"td"> & { readonly figure?: boolean }) {
  return (
    <td
      {...rest}
      className={classNames(
        "border-b py-2 pr-4 align-top last:pr-0",
        figure && "figures whitespace-nowrap text-right",
        className,
      )}
    />
  );
}
