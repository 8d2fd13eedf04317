/** One thing that was tried. `problem` is null where it holds. */
export interface Case {
  readonly name: string;
  readonly problem: {
    /** A failure is a requirement that does not hold; an error is a netlist that cannot be run. */
    readonly kind: "failure" | "error";
    readonly type: string;
    readonly message: string;
    readonly details: string;
  } | null;
}

/** What was tried of one file. */
export interface Suite {
  readonly file: string;
  readonly title: string;
  readonly cases: readonly Case[];
}

/** The report that pipelines know as JUnit XML: a suite a file, a case a requirement. Holds no time, so that it repeats. */
export function junit(suites: readonly Suite[]): string {
  const all = suites.flatMap(({ cases }) => cases);
  const lines = suites.flatMap((suite) => [
    `  <testsuite${attributes({ name: suite.title === "" ? suite.file : suite.title, file: suite.file, ...counts(suite.cases) })}>`,
    ...suite.cases.flatMap((one) => caseLines(one, suite.file)),
    "  </testsuite>",
  ]);
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<testsuites${attributes({ name: "sweepwright", ...counts(all) })}>`,
    ...lines,
    "</testsuites>",
    "",
  ].join("\n");
}

function counts(cases: readonly Case[]) {
  const of = (kind: "failure" | "error") => cases.filter(({ problem }) => problem?.kind === kind).length;
  return { tests: cases.length, failures: of("failure"), errors: of("error") };
}

function caseLines({ name, problem }: Case, file: string): string[] {
  const head = `    <testcase${attributes({ name, classname: file })}`;
  if (problem === null) return [`${head}/>`];
  const { kind, type, message, details } = problem;
  return [
    `${head}>`,
    `      <${kind}${attributes({ type, message })}>${escaped(details)}</${kind}>`,
    "    </testcase>",
  ];
}

function attributes(pairs: Readonly<Record<string, string | number>>): string {
  return Object.entries(pairs)
    .map(
      ([name, value]) =>
        ` ${name}="${escaped(String(value)).replace(/[\n\r\t]/g, (c) => `&#${c.charCodeAt(0)};`)}"`,
    )
    .join("");
}

const NAMED: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&apos;",
};

/** Text for XML 1.0: marks escaped; what the standard forbids (production 2, "Char") becomes U+FFFD. */
function escaped(text: string): string {
  return (
    text
      // biome-ignore lint/suspicious/noControlCharactersInRegex: these are the characters that XML forbids.
      .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff\ud800-\udfff]/gu, "\ufffd")
      .replace(/[&<>"']/g, (mark) => NAMED[mark]!)
  );
}
