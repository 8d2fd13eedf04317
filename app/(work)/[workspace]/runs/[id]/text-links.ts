import type { RunContext } from "./run-shapes";

/** Where the text of a run's revision says what. */
export interface TextLinks extends RunContext {
  /** The address of a line of that text, which never changes. */
  readonly lineHref: (line: number) => string;
}

export function textLinks(
  workspace: string,
  run: { readonly netlistId: string; readonly revision: number },
  context: RunContext,
): TextLinks {
  const base = `/${workspace}/netlists/${run.netlistId}/revisions/${run.revision}`;
  return { ...context, lineHref: (line) => `${base}#L${line}` };
}
