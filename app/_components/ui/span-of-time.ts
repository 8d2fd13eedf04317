const NARROW = "\u202f";

/** The time between two moments (ISO 8601) in words: "38 ms", "1.4 s", "2 min 5 s"; empty while one of them is not known. */
export function formatSpan(from: string | null, to: string | null): string {
  if (from === null || to === null) return "";
  const ms = Math.max(0, Date.parse(to) - Date.parse(from));
  if (ms < 1000) return `${ms}${NARROW}ms`;
  if (ms < 60_000) return `${(ms / 1000).toFixed(ms < 10_000 ? 2 : 1)}${NARROW}s`;
  const seconds = Math.round(ms / 1000);
  const [minutes, hours] = [Math.floor(seconds / 60) % 60, Math.floor(seconds / 3600)];
  return hours > 0
    ? `${hours}${NARROW}h ${minutes}${NARROW}min`
    : `${minutes}${NARROW}min ${seconds % 60}${NARROW}s`;
}
