import type { ReactNode } from "react";
import { DecadeRuler } from "./decade-ruler";

interface StateProps {
  readonly title: string;
  readonly children?: ReactNode;
  /** One button or link that helps. */
  readonly action?: ReactNode;
}

/** Nothing here yet: says what would stand here and how to bring it. */
export function EmptyState({ title, children, action }: StateProps) {
  return (
    <div className="grid justify-items-start gap-3 border-y py-10">
      <span className="text-edge">
        <DecadeRuler decades={3} width={144} />
      </span>
      <div className="max-w-prose">
        <p className="font-semibold">{title}</p>
        <div className="text-quiet text-sm">{children}</div>
      </div>
      {action}
    </div>
  );
}

/** Something could not be shown: what, why, and what the reader can do. Announced. */
export function FailedState({ title, children, action }: StateProps) {
  return (
    <div role="alert" className="grid justify-items-start gap-3 border-broken border-l-2 py-1 pl-4">
      <div className="max-w-prose">
        <p className="font-semibold text-broken">{title}</p>
        <div className="text-quiet text-sm">{children}</div>
      </div>
      {action}
    </div>
  );
}

/** Waiting for something to arrive: a word and a moving hairline. */
export function LoadingState({ children = "Loading…" }: { readonly children?: ReactNode }) {
  return (
    <div role="status" className="grid gap-2 py-6">
      <p className="text-quiet text-sm">{children}</p>
      <ProgressLine />
    </div>
  );
}

/** A hairline that fills to `done` of `total`, or moves when the total is not known. The figures stand beside it as text. */
export function ProgressLine({
  done,
  total,
  label = "Progress",
}: {
  readonly done?: number;
  readonly total?: number;
  readonly label?: string;
}) {
  const known = done !== undefined && total !== undefined && total > 0;
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={known ? 0 : undefined}
      aria-valuemax={known ? total : undefined}
      aria-valuenow={known ? done : undefined}
      className="h-0.5 w-full overflow-hidden bg-rule"
    >
      {known ? (
        <div className="h-full bg-running" style={{ width: `${(100 * done) / total}%` }} />
      ) : (
        <div className="computing h-full w-1/4 bg-running" />
      )}
    </div>
  );
}
