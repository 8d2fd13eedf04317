import { rangeOf } from "./markers";
import { LANGUAGE, monaco } from "./monaco";
import type { Marked } from "./mount-editor";

const NONE: monaco.languages.CodeActionList = { actions: [], dispose: () => {} };

/** Offers the fixes of the problems at the cursor by the editor's own key (Ctrl or ⌘ and a full stop). */
export function offerFixes(
  model: monaco.editor.ITextModel,
  current: () => Marked | null,
): monaco.IDisposable {
  return monaco.languages.registerCodeActionProvider(LANGUAGE, {
    provideCodeActions: (of, range) => {
      const marked = of === model ? current() : null;
      if (marked === null) return NONE;
      const { text, diagnostics } = marked;
      const actions = diagnostics.flatMap((one) => {
        const touched = monaco.Range.areIntersectingOrTouching(rangeOf(text, one), range);
        if (one.fix === undefined || !touched) return [];
        const textEdit = { range: rangeOf(text, one.fix), text: one.fix.text };
        const edits = [{ resource: model.uri, versionId: model.getVersionId(), textEdit }];
        return [{ title: one.fix.title, kind: "quickfix", isPreferred: true, edit: { edits } }];
      });
      return { ...NONE, actions };
    },
  });
}
