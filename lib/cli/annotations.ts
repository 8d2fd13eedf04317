/** One thing to say at a place of a file. Lines and columns count from 1. */
export interface Remark {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly severity: "error" | "warning";
  /** A diagnostic's code, or the verdict of a requirement. */
  readonly code: string;
  readonly message: string;
}

/** One line a remark, as compilers write them and pipelines read them: `file:line:column: error NAM3: message`. */
export function annotation({ file, line, column, severity, code, message }: Remark): string {
  return `${file}:${line}:${column}: ${severity} ${code}: ${message.replace(/\s+/g, " ")}\n`;
}
