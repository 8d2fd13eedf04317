import { counted } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import { LoadingState } from "@/app/_components/ui/states";
import type { Preview } from "./previewing";
import { tooLargeInWords } from "./row-words";

/** What is to be said of the preview beside its curves: why there are none, or why they are not those of the text. */
export function PreviewRemark({ preview }: { readonly preview: Preview }) {
  const { state, row, outline, errors, why } = preview;
  if (state === "missing") {
    return (
      <Notice tone="caution" title={row === null ? "There is no preview here" : "The preview has stopped"}>
        <p>This browser could not start the solving or had to end it. A queued run does not need it.</p>
      </Notice>
    );
  }
  if (state === "wrong" && row === null) {
    return (
      <Notice tone="plain" title="Nothing to preview yet">
        <p>
          The text has {counted(errors, "error")} to mend, listed below it; the curves come as soon as it has
          none.
        </p>
      </Notice>
    );
  }
  if (state === "too large" && why !== null) {
    return (
      <Notice
        tone="plain"
        title={row === null ? "Too large to preview" : "Only some of the points are shown"}
      >
        <p>{tooLargeInWords(why)}</p>
      </Notice>
    );
  }
  if (row === null) return <LoadingState>Solving the preview…</LoadingState>;
  const notes = [
    ...(outline?.seek
      ? [`One operating point at each setting is shown; a run looks for up to ${outline.seek}.`]
      : []),
    ...(row.traces.length === 0
      ? ["Nothing is shown by the text yet; a line such as “show out.v” gives a curve."]
      : []),
  ];
  return notes.length === 0 ? null : <p className="text-quiet text-sm">{notes.join(" ")}</p>;
}
