import * as monaco from "monaco-editor/editor";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { language } from "./language-thread";
import { lineEdits } from "./line-edits";
import { rangeOf } from "./markers";
import { blankAsks, suggestionsOf } from "./suggestions";

/** The problems of one text. */
export interface Marked {
  readonly text: string;
  readonly diagnostics: readonly Diagnostic[];
}

/** Gives the problems of a model where they are those of its present text. */
const marks = new WeakMap<monaco.editor.ITextModel, () => Marked | null>();

export function offerFixesOf(model: monaco.editor.ITextModel, current: () => Marked | null): void {
  marks.set(model, current);
}

export function readModel(model: monaco.editor.ITextModel): string {
  return model.getValue(monaco.editor.EndOfLinePreference.LF);
}

/** Tells the editor, once for the language, whom to ask. */
export function registerProviders(id: string): void {
  monaco.languages.registerCompletionItemProvider(id, {
    triggerCharacters: [".", " "],
    provideCompletionItems,
  });
  monaco.languages.registerCodeActionProvider(id, { provideCodeActions });
  monaco.languages.registerFoldingRangeProvider(id, { provideFoldingRanges });
  monaco.languages.registerDocumentFormattingEditProvider(id, { provideDocumentFormattingEdits });
}

async function provideCompletionItems(
  model: monaco.editor.ITextModel,
  position: monaco.Position,
  { triggerCharacter }: monaco.languages.CompletionContext,
  cancelled: monaco.CancellationToken,
): Promise<monaco.languages.CompletionList> {
  const none = { suggestions: [] };
  const line = model.getLineContent(position.lineNumber).slice(0, position.column - 1);
  if (triggerCharacter === " " && !blankAsks(line)) return none;
  const text = readModel(model);
  const found = await language.ask("complete", text, { offset: model.getOffsetAt(position) });
  if (cancelled.isCancellationRequested) return none;
  const suggestions = suggestionsOf(text, found).map(({ label, detail, about, goesOn, ...rest }) => ({
    ...rest,
    label: { label, description: detail },
    documentation: about,
    kind: monaco.languages.CompletionItemKind.Text,
    insertTextRules: monaco.languages.CompletionItemInsertTextRule.InsertAsSnippet,
    ...(goesOn ? { command: { id: "editor.action.triggerSuggest", title: "" } } : {}),
  }));
  return { suggestions, incomplete: true };
}

function provideCodeActions(
  model: monaco.editor.ITextModel,
  range: monaco.Range,
): monaco.languages.CodeActionList {
  const actions = fixesAt(model, range).map(({ title, edit }) => {
    const edits = [{ resource: model.uri, versionId: model.getVersionId(), textEdit: edit }];
    return { title, kind: "quickfix", isPreferred: true, edit: { edits } };
  });
  return { actions, dispose: () => {} };
}

/** The fixes of the problems that a range touches, in the order of the text. */
export function fixesAt(
  model: monaco.editor.ITextModel,
  range: monaco.Range,
): { readonly title: string; readonly edit: { readonly range: monaco.IRange; readonly text: string } }[] {
  const { text, diagnostics } = marks.get(model)?.() ?? { text: "", diagnostics: [] };
  return diagnostics.flatMap((one) => {
    const touched = monaco.Range.areIntersectingOrTouching(rangeOf(text, one), range);
    if (one.fix === undefined || !touched) return [];
    return [{ title: one.fix.title, edit: { range: rangeOf(text, one.fix), text: one.fix.text } }];
  });
}

async function provideFoldingRanges(
  model: monaco.editor.ITextModel,
): Promise<monaco.languages.FoldingRange[]> {
  const folds = await language.ask("folds", readModel(model), {});
  return folds.map(({ first, last, what }) => ({
    start: first,
    end: last,
    ...(what === "comment" ? { kind: monaco.languages.FoldingRangeKind.Comment } : {}),
  }));
}

async function provideDocumentFormattingEdits(
  model: monaco.editor.ITextModel,
): Promise<monaco.languages.TextEdit[]> {
  const text = readModel(model);
  const formatted = await language.ask("format", text, {});
  if (model.isDisposed() || readModel(model) !== text) return [];
  return lineEdits(text, formatted).map((edit) => ({ range: rangeOf(text, edit), text: edit.text }));
}
