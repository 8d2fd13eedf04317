export type MarkShape = "check" | "cross" | "ring" | "half" | "bar" | "diamond";

const PATHS: Record<MarkShape, React.ReactNode> = {
  check: <path d="M1.5 6.5 4.5 9.5 10.5 2.5" strokeWidth="2" fill="none" />,
  cross: <path d="M2 2 10 10M10 2 2 10" strokeWidth="2" fill="none" />,
  ring: <circle cx="6" cy="6" r="4" strokeWidth="1.5" fill="none" />,
  half: (
    <>
      <circle cx="6" cy="6" r="4" strokeWidth="1.5" fill="none" />
      <path d="M6 2a4 4 0 0 1 0 8z" fill="currentColor" stroke="none" />
    </>
  ),
  bar: <path d="M2 6h8" strokeWidth="2" fill="none" />,
  diamond: <path d="M6 1.5 10.5 6 6 10.5 1.5 6z" strokeWidth="1.5" fill="none" />,
};

/** The shape that stands beside a word of state, 12 px, in the colour of the text around it. */
export function StateMark({ shape }: { readonly shape: MarkShape }) {
  return (
    <svg
      width="12"
      height="12"
      viewBox="0 0 12 12"
      stroke="currentColor"
      aria-hidden="true"
      className="shrink-0"
    >
      {PATHS[shape]}
    </svg>
  );
}
