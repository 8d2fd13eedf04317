import { counted, formatCount } from "@/app/_components/ui/count";

interface Props {
  readonly listed: number;
  readonly count: number;
}

/** Says that a list of settings is not whole; nothing where it is. */
export function UnlistedSettings({ listed, count }: Props) {
  if (listed >= count) return null;
  return (
    <p className="mt-1 text-quiet text-sm">
      The first {counted(listed, "setting")} of {formatCount(count)}; the run document has all of them.
    </p>
  );
}
