import { classNames } from "@/app/_components/ui/class-names";
import { HeadCell } from "@/app/_components/ui/table";

/** A head cell one presses to sort by its column; the arrow and `aria-sort` say how it is sorted now. */
export function SortHead({
  label,
  sorted,
  onPress,
  className,
}: {
  readonly label: string;
  readonly sorted: false | "asc" | "desc";
  readonly onPress: () => void;
  readonly className?: string | undefined;
}) {
  return (
    <HeadCell
      aria-sort={sorted === false ? undefined : sorted === "asc" ? "ascending" : "descending"}
      className={classNames("py-1", className)}
    >
      <button
        type="button"
        onClick={onPress}
        className={classNames(
          "-mx-1 inline-flex min-h-7 items-center gap-1 rounded-[2px] px-1 hover:text-ink",
          sorted !== false && "text-ink",
        )}
      >
        {label}
        <svg width="8" height="10" viewBox="0 0 8 10" fill="currentColor" aria-hidden="true">
          {sorted !== "desc" && <path d="M4 0 8 4H0z" opacity={sorted === "asc" ? 1 : 0.45} />}
          {sorted !== "asc" && <path d="M4 10 8 6H0z" opacity={sorted === "desc" ? 1 : 0.45} />}
        </svg>
      </button>
    </HeadCell>
  );
}
