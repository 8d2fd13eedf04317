import { FUNCTIONS } from "./functions";
import { nearest } from "./nearest";
import { REDUCTIONS } from "./reductions";
import type { Report } from "./report";
import type { Expression } from "./syntax";
import { quote } from "./token";

type Call = Extract<Expression, { kind: "call" }>;

/** What is meant by the greatest or least of one trace. */
const ALONG_THE_SWEEP: Readonly<Record<string, string>> = { max: "highest", min: "lowest" };

/** A call of what is no function (NAM10). */
export function reportUnknownFunction({ callee, args, ...span }: Call, report: Report): void {
  const start = `${quote(callee.text)} is no function`;
  if (callee.text === "log") {
    const fix = { title: "Change to log10", from: callee.from, to: callee.to, text: "log10" };
    report.error("NAM10", callee, `${start}, for it may mean either of two; write \`log10\` or \`ln\`.`, fix);
    return;
  }
  // `V(out)`, `i(R1)`: a signal written as a function.
  const [only] = args;
  const signal = callee.text.toLowerCase();
  if (["v", "i"].includes(signal) && args.length === 1 && only?.kind === "name") {
    const text = `${only.path.map((word) => word.text).join(".")}.${signal}`;
    const fix = { title: `Write ${text}`, from: span.from, to: span.to, text };
    report.error("NAM10", callee, `${start}; a signal is written ${quote(text)}.`, fix);
    return;
  }
  const search = () => nearest(callee.text, [...Object.keys(FUNCTIONS), ...Object.keys(REDUCTIONS)]);
  const all = "the functions are exp, ln, log10, sqrt, abs, min, max, tanh, atan and if";
  report.propose("NAM10", callee, start, search, all);
}

/** A function with too few values or too many (FRM12). `isReduced`: reductions may stand here. */
export function reportCount(
  call: Call,
  { least, most }: { readonly least: number; readonly most: number },
  isReduced: boolean,
  report: Report,
): void {
  const { callee, args } = call;
  const wants = least === most ? String(least) : `${least} to ${most}`;
  const values = wants === "1" ? "1 value" : `${wants} values`;
  const message = `${quote(callee.text)} wants ${values} in its brackets, not ${args.length}`;
  const along = args.length === 1 && isReduced ? ALONG_THE_SWEEP[callee.text] : undefined;
  if (along === undefined) {
    report.error("FRM12", call, `${message}.`);
    return;
  }
  const fix = { title: `Change to ${along}`, from: callee.from, to: callee.to, text: along };
  report.error("FRM12", call, `${message}; along the sweep it is ${quote(along)}.`, fix);
}
