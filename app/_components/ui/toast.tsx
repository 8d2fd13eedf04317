"use client";

import Link from "next/link";
import { Toast as Radix } from "radix-ui";
import { createContext, type ReactNode, useCallback, useContext, useState } from "react";
import { classNames } from "./class-names";
import { StateMark } from "./state-mark";

export interface ToastMessage {
  readonly title: string;
  readonly detail?: string;
  readonly tone?: "holds" | "broken";
  /** Where it happened. */
  readonly open?: { readonly href: string; readonly words: string };
}

const ToastContext = createContext<((message: ToastMessage) => void) | null>(null);

/** `notify(message)`: says in the corner what happened elsewhere. What readers do themselves is answered where they did it. */
export function useToast(): (message: ToastMessage) => void {
  const notify = useContext(ToastContext);
  if (notify === null) throw new Error("useToast needs a ToastProvider above it.");
  return notify;
}

/** Shows the messages of `useToast` below right, each for eight seconds or until dismissed; F8 moves focus to them. */
export function ToastProvider({ children }: { readonly children: ReactNode }) {
  const [messages, setMessages] = useState<readonly (ToastMessage & { readonly id: number })[]>([]);
  const notify = useCallback((message: ToastMessage) => {
    setMessages((before) => [...before.slice(-2), { ...message, id: (before.at(-1)?.id ?? 0) + 1 }]);
  }, []);
  const drop = (id: number) => setMessages((before) => before.filter((message) => message.id !== id));
  return (
    <ToastContext.Provider value={notify}>
      <Radix.Provider duration={8000} swipeDirection="right">
        {children}
        {messages.map(({ id, title, detail, tone, open }) => (
          <Radix.Root
            key={id}
            onOpenChange={(open) => !open && drop(id)}
            className={classNames(
              "flex items-start gap-2.5 rounded-[2px] border bg-surface px-3 py-2.5 text-ink text-sm",
              tone === "broken" ? "border-broken" : "border-edge",
            )}
          >
            {tone !== undefined && (
              <span className={classNames("mt-1", tone === "broken" ? "text-broken" : "text-holds")}>
                <StateMark shape={tone === "broken" ? "cross" : "check"} />
              </span>
            )}
            <div className="min-w-0 grow">
              <Radix.Title className="font-semibold">{title}</Radix.Title>
              {detail !== undefined && <Radix.Description className="text-quiet">{detail}</Radix.Description>}
              {open !== undefined && (
                <Radix.Action asChild altText={open.words}>
                  <Link href={open.href} prefetch={false} className="link inline-flex min-h-6 items-center">
                    {open.words}
                  </Link>
                </Radix.Action>
              )}
            </div>
            <Radix.Close className="-my-0.5 min-h-6 min-w-6 rounded-[2px] px-1 text-quiet hover:text-ink">
              Close
            </Radix.Close>
          </Radix.Root>
        ))}
        <Radix.Viewport className="fixed right-4 bottom-4 z-50 grid w-[min(384px,calc(100vw-32px))] gap-2" />
      </Radix.Provider>
    </ToastContext.Provider>
  );
}
