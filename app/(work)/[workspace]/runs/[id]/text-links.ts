import type { RunContext } from "./run-shapes";

/** Where the text of a run's revision says what. */
export interface TextLinks extends RunContext {
  /** The address of a line of that text, which never changes. */
  readonly lineHref: (line: number) => string;
  /** The address of that line in the sheet, where it can be mended; null where the sheet has moved on to another text. */
  readonly sheetHref: (line: number) => string | null;
}

export function textLinks(
  workspace: string,
  run: { readonly netlistId: string; readonly revision: number },
  context: RunContext,
): TextLinks {
  const netlist = `/${workspace}/netlists/${run.netlistId}`;
  const isNewest = run.revision === context.latestRevision;
  return {
    ...context,
    lineHref: (line) => `${netlist}/revisions/${run.revision}#L${line}`,
    sheetHref: (line) => (isNewest ? `${netlist}#L${line}` : null),
  };
}
