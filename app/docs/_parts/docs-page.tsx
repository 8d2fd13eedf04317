import type { ReactNode } from "react";
import { Outline, type OutlineEntry } from "./outline";

/** A page of the reference: its title, what it is about, an outline, and sections. */
export function DocsPage({
  title,
  lead,
  outline,
  children,
}: {
  readonly title: string;
  readonly lead: ReactNode;
  readonly outline: readonly OutlineEntry[];
  readonly children: ReactNode;
}) {
  return (
    <div className="gap-x-10 xl:grid xl:grid-cols-[minmax(0,1fr)_13rem]">
      <div className="xl:col-start-1">
        <h1 className="text-2xl tracking-tight md:text-3xl">{title}</h1>
        <div className="mt-3 mb-6 max-w-2xl text-lg text-quiet">{lead}</div>
      </div>
      <div className="xl:col-start-2 xl:row-span-2 xl:row-start-1">
        <Outline entries={outline} />
      </div>
      <div className="max-w-4xl xl:col-start-1">{children}</div>
    </div>
  );
}

/** A part of a page under a heading that has an address. */
export function Section({
  id,
  title,
  children,
}: {
  readonly id: string;
  readonly title: ReactNode;
  readonly children: ReactNode;
}) {
  return (
    <section aria-labelledby={id} className="mt-10 border-t pt-5 first:mt-0">
      <h2 id={id} className="group scroll-mt-4 text-xl tracking-tight">
        <Anchor id={id}>{title}</Anchor>
      </h2>
      <div className="mt-2">{children}</div>
    </section>
  );
}

/** One thing among its like, such as a statement or a function: what a filter shows or hides. */
export function Entry({
  id,
  title,
  children,
}: {
  readonly id: string;
  readonly title: ReactNode;
  readonly children: ReactNode;
}) {
  return (
    <section aria-labelledby={id} data-entry="" className="mt-7">
      <h3 id={id} className="group scroll-mt-4 text-base">
        <Anchor id={id}>{title}</Anchor>
      </h3>
      {children}
    </section>
  );
}

function Anchor({ id, children }: { readonly id: string; readonly children: ReactNode }) {
  return (
    <a
      href={`#${id}`}
      className="inline-flex min-h-6 max-w-full flex-wrap items-center gap-x-2 hover:underline"
    >
      {children}
      <span aria-hidden="true" className="font-normal text-quiet opacity-0 group-hover:opacity-100">
        #
      </span>
    </a>
  );
}

/** Running text of a section. */
export function Text({ children }: { readonly children: ReactNode }) {
  return <p className="mt-2 max-w-2xl">{children}</p>;
}

/** What is to be kept in mind, one sentence an item. */
export function Points({ items }: { readonly items: readonly ReactNode[] }) {
  return (
    <ul className="mt-2 grid max-w-2xl list-disc gap-1 pl-5 marker:text-quiet">
      {items.map((item, k) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the sentences of a page never change their order
        <li key={k}>{item}</li>
      ))}
    </ul>
  );
}
