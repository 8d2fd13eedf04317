import Link from "next/link";
import { ButtonLink } from "./_components/ui/button";
import { Wordmark } from "./_components/ui/logo";
import { EmptyState } from "./_components/ui/states";

export const metadata = { title: "Not found" };

export default function NotFound() {
  return (
    <div className="mx-auto max-w-3xl px-4 py-6 md:px-6">
      <header>
        <Link href="/" aria-label="Sweepwright, start" className="inline-flex min-h-8 items-center">
          <Wordmark />
        </Link>
      </header>
      <main className="mt-12 grid gap-6">
        <h1 className="text-2xl">Nothing stands at this address</h1>
        <EmptyState title="Check the address" action={<ButtonLink href="/">Go to the start</ButtonLink>}>
          <p>It may be mistyped, or the thing it names belongs to a workspace you are not a member of.</p>
        </EmptyState>
      </main>
    </div>
  );
}
