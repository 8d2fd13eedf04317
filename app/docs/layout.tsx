import type { Metadata } from "next";
import Link from "next/link";
import type { ReactNode } from "react";
import { EnterLink } from "@/app/_components/ui/enter-link";
import { Wordmark } from "@/app/_components/ui/logo";
import { currentUser } from "@/lib/auth/actor";
import "./docs.css";
import { DocsNavigation } from "./_parts/docs-navigation";

export const metadata: Metadata = {
  title: { default: "Reference · Sweepwright", template: "%s · Reference · Sweepwright" },
};

/** The reference is open to everyone: signing in changes nothing here but the way to the work. */
export default async function DocsLayout({ children }: { readonly children: ReactNode }) {
  const user = await currentUser();
  return (
    <div className="mx-auto flex min-h-dvh w-full max-w-[96rem] flex-col px-4 md:px-6">
      <a
        href="#content"
        className="sr-only z-50 bg-surface px-3 py-2 focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
      >
        Skip to the content
      </a>
      <header className="flex min-h-13 flex-wrap items-center gap-x-3 border-b sm:gap-x-4" data-print="never">
        <Link href="/" aria-label="Sweepwright, start" className="inline-flex min-h-8 items-center">
          <Wordmark />
        </Link>
        <Link href="/docs" className="inline-flex min-h-8 items-center text-quiet text-sm hover:text-ink">
          Reference
        </Link>
        <div className="ml-auto">
          <EnterLink isSignedIn={user !== null} />
        </div>
      </header>
      <div className="grow gap-x-10 lg:grid lg:grid-cols-[11rem_minmax(0,1fr)]">
        <DocsNavigation />
        <main id="content" tabIndex={-1} className="min-w-0 py-6 outline-none lg:py-8">
          {children}
        </main>
      </div>
      <footer className="border-t py-4 text-quiet text-xs">
        Results come from models, which leave things out; they are no proof of safety.
      </footer>
    </div>
  );
}
