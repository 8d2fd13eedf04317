import { ProgressLine } from "./states";

/**
 * What stands while a page is on its way: its band at the height it will have, with its title where that is known, and a moving
 * hairline under it. The rest stays empty, so that nothing moves when the page comes.
 */
export function PageLoading({
  title,
  words = "Loading…",
}: {
  readonly title?: string;
  readonly words?: string;
}) {
  return (
    <>
      <div className="flex min-h-[69px] flex-wrap items-baseline gap-x-4 px-4 pt-5 md:px-6">
        {title !== undefined && <h1 className="text-xl leading-tight">{title}</h1>}
        <p role="status" className="text-quiet text-sm">
          {words}
        </p>
      </div>
      <ProgressLine label={words} />
    </>
  );
}
