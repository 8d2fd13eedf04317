"use client";

import "./globals.css";
import { Button } from "./_components/ui/button";
import { FailedState } from "./_components/ui/states";

// Takes the place of the root layout when that itself fails, hence its own html and body.
export default function GlobalError({ retry }: { readonly error: unknown; readonly retry: () => void }) {
  return (
    <html lang="en">
      <body>
        <title>Sweepwright could not start this page</title>
        <main className="mx-auto max-w-3xl px-4 py-16 md:px-6">
          <h1 className="sr-only">Sweepwright could not start this page</h1>
          <FailedState
            title="Sweepwright could not start this page"
            action={<Button onClick={retry}>Try again</Button>}
          >
            <p>The service did not answer as it should. Nothing you saved is lost.</p>
          </FailedState>
        </main>
      </body>
    </html>
  );
}
