"use client";

import Link from "next/link";
import { DropdownMenu } from "radix-ui";
import type { ReactNode } from "react";
import { StateMark } from "./state-mark";

const ITEM =
  "flex min-h-8 cursor-pointer items-center gap-2 rounded-[2px] px-2 text-sm outline-none data-[highlighted]:bg-wash data-[disabled]:opacity-55";

/** A menu that opens from `trigger` (one button element). Arrow keys, type-ahead and Escape come with it. */
export function Menu({
  trigger,
  align = "end",
  onClosed,
  children,
}: {
  readonly trigger: ReactNode;
  readonly align?: "start" | "end";
  /** When it has closed; prevent the event's default to give the focus to something other than the trigger. */
  readonly onClosed?: (event: Event) => void;
  readonly children: ReactNode;
}) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align={align}
          sideOffset={4}
          collisionPadding={8}
          {...(onClosed === undefined ? {} : { onCloseAutoFocus: onClosed })}
          className="z-40 max-h-(--radix-dropdown-menu-content-available-height) min-w-52 max-w-80 overflow-y-auto rounded-[2px] border border-edge bg-surface p-1 text-ink"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

export function MenuItem({
  children,
  onSelect,
  disabled = false,
}: {
  readonly children: ReactNode;
  readonly onSelect: () => void;
  readonly disabled?: boolean;
}) {
  return (
    <DropdownMenu.Item className={ITEM} onSelect={onSelect} disabled={disabled}>
      {children}
    </DropdownMenu.Item>
  );
}

export function MenuLink({ children, href }: { readonly children: ReactNode; readonly href: string }) {
  return (
    <DropdownMenu.Item asChild className={ITEM}>
      <Link href={href}>{children}</Link>
    </DropdownMenu.Item>
  );
}

export function MenuLabel({ children }: { readonly children: ReactNode }) {
  return <DropdownMenu.Label className="px-2 pt-2 pb-1 text-quiet text-xs">{children}</DropdownMenu.Label>;
}

export function MenuSeparator() {
  return <DropdownMenu.Separator className="my-1 border-t" />;
}

/** One of several: the chosen one carries a check. */
export function MenuChoice<T extends string>({
  value,
  options,
  onChange,
}: {
  readonly value: T;
  readonly options: readonly { readonly value: T; readonly label: string }[];
  readonly onChange: (value: T) => void;
}) {
  return (
    <DropdownMenu.RadioGroup value={value} onValueChange={(next) => onChange(next as T)}>
      {options.map((option) => (
        <DropdownMenu.RadioItem key={option.value} value={option.value} className={ITEM}>
          <span className="w-3">
            <DropdownMenu.ItemIndicator>
              <StateMark shape="check" />
            </DropdownMenu.ItemIndicator>
          </span>
          {option.label}
        </DropdownMenu.RadioItem>
      ))}
    </DropdownMenu.RadioGroup>
  );
}
