"use client";

import { Button } from "./_components/ui/button";
import { FailedState } from "./_components/ui/states";

export default function PageError({ retry }: { readonly error: unknown; readonly retry: () => void }) {
  return (
    <main className="mx-auto max-w-3xl px-4 py-16 md:px-6">
      <h1 className="sr-only">This page could not be shown</h1>
      <FailedState title="This page could not be shown" action={<Button onClick={retry}>Try again</Button>}>
        <p>The service did not answer as it should. Nothing you saved is lost.</p>
      </FailedState>
    </main>
  );
}
