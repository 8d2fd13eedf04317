"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { classNames } from "@/app/_components/ui/class-names";

/** The pages of a workspace; the present one carries the copper line and `aria-current`. */
export function Navigation({ workspace }: { readonly workspace: string }) {
  const path = usePathname();
  const home = `/${workspace}`;
  const links = [
    { href: home, label: "Home", here: path === home },
    { href: `${home}/netlists`, label: "Netlists", here: path.startsWith(`${home}/netlists`) },
    { href: `${home}/runs`, label: "Runs", here: path.startsWith(`${home}/runs`) },
  ];
  return (
    <nav aria-label="Workspace" className="flex h-full gap-4 md:gap-6">
      {links.map(({ href, label, here }) => (
        <Link
          key={href}
          href={href}
          aria-current={here ? "page" : undefined}
          className={classNames(
            "flex h-full items-center border-y-2 border-t-transparent text-sm",
            here
              ? "border-b-accent font-semibold text-ink"
              : "border-b-transparent text-quiet hover:text-ink",
          )}
        >
          {label}
        </Link>
      ))}
    </nav>
  );
}
