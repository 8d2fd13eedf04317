import { cssColour, type LineStyle } from "./line-style";

/** A short piece of a line in its colour and dashes, for labels and legends. */
export function LineSample({ style }: { readonly style: LineStyle }) {
  return (
    <svg
      aria-hidden="true"
      width="26"
      height="8"
      viewBox="0 0 26 8"
      fill="none"
      className="inline-block shrink-0"
    >
      <path d="M0 4H26" stroke={cssColour(style)} strokeWidth="2" strokeDasharray={style.dash.join(" ")} />
    </svg>
  );
}
