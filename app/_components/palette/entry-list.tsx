import type { Ref } from "react";
import { classNames } from "@/app/_components/ui/class-names";
import { type Entry, GROUP_NAMES, GROUPS } from "./deeds";
import { useShownKeys } from "./shown-keys";

interface Props {
  /** Begins the ids of the rows. */
  readonly id: string;
  readonly ref: Ref<HTMLDivElement>;
  readonly entries: readonly Entry[];
  readonly active: Entry | undefined;
  readonly onPoint: (key: string) => void;
  readonly onTake: (entry: Entry) => void;
}

/** What was found, group by group; the field above it has its keys. */
export function EntryList({ id, ref, entries, active, onPoint, onTake }: Props) {
  const keys = useShownKeys();
  return (
    <div
      ref={ref}
      id={`${id}-list`}
      role="listbox"
      aria-label="Found"
      className="h-[min(26rem,60dvh)] overflow-y-auto pb-2"
    >
      {GROUPS.map((group) => {
        const rows = entries.filter((entry) => entry.group === group);
        if (rows.length === 0) return null;
        return (
          // biome-ignore lint/a11y/useSemanticElements: a group of options, for which HTML has no element
          <div key={group} role="group" aria-label={GROUP_NAMES[group]}>
            <p aria-hidden="true" className="caption px-4 pt-3 pb-1">
              {GROUP_NAMES[group]}
            </p>
            {rows.map((entry) => (
              // biome-ignore lint/a11y/useKeyWithClickEvents: the field above the list has the keys of all its options
              <div
                key={entry.key}
                id={`${id}-${entry.key}`}
                role="option"
                tabIndex={-1}
                aria-selected={entry === active}
                onMouseMove={() => onPoint(entry.key)}
                onClick={() => onTake(entry)}
                className={classNames(
                  "flex min-h-9 cursor-pointer items-baseline gap-x-3 border-transparent border-l-2 px-4 py-1.5 text-sm",
                  entry === active && "border-l-accent bg-wash",
                )}
              >
                <span className="min-w-0 grow break-words">
                  {entry.words}
                  {entry.note !== undefined && <span className="ml-2 text-quiet text-xs">{entry.note}</span>}
                </span>
                {entry.keys !== undefined && (
                  <span className="figures shrink-0 text-quiet text-xs">{keys(entry.keys)}</span>
                )}
              </div>
            ))}
          </div>
        );
      })}
    </div>
  );
}
