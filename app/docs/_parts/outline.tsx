/** A heading that one can go to. */
export interface OutlineEntry {
  readonly id: string;
  readonly label: string;
}

function Entries({ entries }: { readonly entries: readonly OutlineEntry[] }) {
  return (
    <ul className="mt-1">
      {entries.map(({ id, label }) => (
        <li key={id}>
          <a
            href={`#${id}`}
            className="flex min-h-7 items-center py-0.5 text-quiet text-sm leading-snug hover:text-ink"
          >
            {label}
          </a>
        </li>
      ))}
    </ul>
  );
}

/** What stands on a page: beside the text where there is room, else a list that opens above it. */
export function Outline({ entries }: { readonly entries: readonly OutlineEntry[] }) {
  return (
    <nav aria-label="On this page" data-print="never" className="xl:h-full">
      <details className="mb-4 border-y py-1 xl:hidden">
        <summary className="flex min-h-8 items-center gap-2 text-quiet text-sm">
          <span aria-hidden="true">▾</span> On this page
        </summary>
        <div className="pb-2 pl-5 sm:columns-2 md:columns-3">
          <Entries entries={entries} />
        </div>
      </details>
      <div className="sticky top-0 hidden max-h-dvh overflow-y-auto py-1 xl:block">
        <p className="caption">On this page</p>
        <Entries entries={entries} />
      </div>
    </nav>
  );
}
