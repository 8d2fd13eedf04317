"use client";

import { Button } from "@/app/_components/ui/button";
import { FailedState } from "@/app/_components/ui/states";

export default function WorkspaceError({
  error,
  retry,
}: {
  readonly error: unknown;
  readonly retry: () => void;
}) {
  const digest = error instanceof Error && "digest" in error ? String(error.digest) : null;
  return (
    <div className="px-4 py-8 md:px-6">
      <h1 className="sr-only">This page could not be shown</h1>
      <FailedState title="This page could not be shown" action={<Button onClick={retry}>Try again</Button>}>
        <p>Nothing you saved is lost. If it happens again, tell whoever looks after this service.</p>
        {digest !== null && (
          <p>
            Reference <code>{digest}</code>
          </p>
        )}
      </FailedState>
    </div>
  );
}
