/** The mark: one decade of a ruler hanging from its edge, its ticks closing up to the right. */
export function Logo() {
  return (
    <svg
      width="30"
      height="14"
      viewBox="0 0 30 14"
      stroke="currentColor"
      fill="none"
      strokeWidth="1.25"
      aria-hidden="true"
      className="shrink-0"
    >
      <path d="M1 13V2H29V13" />
      <path d="M9.4 2V6M14.4 2V6M17.9 2V6M20.6 2V9M22.8 2V6M24.7 2V6M26.3 2V6M27.7 2V6" strokeWidth="1" />
    </svg>
  );
}

/** Mark and name together. */
export function Wordmark() {
  return (
    <span className="inline-flex items-center gap-2.5 font-bold text-ink tracking-tight">
      <Logo />
      Sweepwright
    </span>
  );
}
