"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { classNames } from "@/app/_components/ui/class-names";
import { DOCS_GROUPS } from "./pages";

function Pages({ path }: { readonly path: string }) {
  return DOCS_GROUPS.map(({ title, pages }) => (
    <div key={title}>
      <p className="caption">{title}</p>
      <ul className="mt-1">
        {pages.map(({ href, label }) => {
          const here = path === href || path.startsWith(`${href}/`);
          return (
            <li key={href}>
              <Link
                href={href}
                aria-current={here ? "page" : undefined}
                className={classNames(
                  "flex min-h-8 items-center border-l-2 pl-3 text-sm",
                  here
                    ? "border-accent font-semibold text-ink"
                    : "text-quiet hover:border-edge hover:text-ink",
                )}
              >
                {label}
              </Link>
            </li>
          );
        })}
      </ul>
    </div>
  ));
}

/** The pages of the reference: a column beside the text, or on a narrow screen a list that opens above it. */
export function DocsNavigation() {
  const path = usePathname();
  const here = DOCS_GROUPS.flatMap(({ pages }) => pages).find(({ href }) => path.startsWith(href));
  return (
    <nav aria-label="Reference" data-print="never">
      <details key={path} className="border-b py-1 lg:hidden">
        <summary className="flex min-h-8 items-center gap-2 text-sm">
          <span aria-hidden="true">▾</span>
          <span className="text-quiet">Reference</span>
          {here !== undefined && <span className="font-semibold">{here.label}</span>}
        </summary>
        <div className="grid gap-4 py-3 sm:grid-cols-3">
          <Pages path={path} />
        </div>
      </details>
      <div className="sticky top-0 hidden max-h-dvh gap-6 overflow-y-auto py-8 lg:grid">
        <Pages path={path} />
      </div>
    </nav>
  );
}
