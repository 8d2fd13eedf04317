import { PlainLines } from "@/app/_components/editor/plain-lines";
import { LiveBox } from "./live-box";

interface Props {
  /** A whole netlist. */
  readonly text: string;
  /** What the example shows, in a few words: its heading and its name for assistive technology. */
  readonly title: string;
  /** With controls for its knobs below the curve; without, the curve, the requirements and the readings alone. */
  readonly hasKnobs?: boolean;
}

/**
 * A netlist to read and to try inside a page: its text, and beside it what it gives. The text is rendered by the server; the browser
 * solves it when it comes into view, and fetches the editor when one begins to write.
 */
export function LiveExample({ text, title, hasKnobs = false }: Props) {
  return (
    <LiveBox text={text} title={title} hasKnobs={hasKnobs}>
      <PlainLines text={text} label={`Netlist text: ${title}`} />
    </LiveBox>
  );
}
