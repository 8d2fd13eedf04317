import type { ReactNode } from "react";

/** The band under the navigation: the page's one h1, a quiet remark beside it, actions at the right. As high with actions as without. */
export function PageHeader({
  title,
  remark,
  actions,
}: {
  readonly title: string;
  readonly remark?: ReactNode;
  readonly actions?: ReactNode;
}) {
  return (
    <div className="flex min-h-[69px] flex-wrap items-center gap-x-4 gap-y-3 border-b px-4 py-4 md:px-6">
      <div className="flex min-w-0 grow flex-wrap items-baseline gap-x-4 gap-y-1">
        <h1 className="min-w-0 break-words text-xl leading-tight">{title}</h1>
        {remark !== undefined && <div className="text-quiet text-sm">{remark}</div>}
      </div>
      {actions !== undefined && (
        <div className="flex flex-wrap items-center gap-2" data-print="never">
          {actions}
        </div>
      )}
    </div>
  );
}
