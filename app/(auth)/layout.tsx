import Link from "next/link";
import type { ReactNode } from "react";
import { DecadeRuler } from "@/app/_components/ui/decade-ruler";
import { Wordmark } from "@/app/_components/ui/logo";

export default function AccountLayout({ children }: { readonly children: ReactNode }) {
  return (
    <div className="mx-auto w-full max-w-sm px-4 py-8 sm:py-24">
      <header>
        <Link href="/" aria-label="Sweepwright, start" className="inline-flex min-h-8 items-center">
          <Wordmark />
        </Link>
      </header>
      <div className="mt-6 text-edge">
        <DecadeRuler decades={4} width={352} />
      </div>
      <main className="mt-8">{children}</main>
    </div>
  );
}
