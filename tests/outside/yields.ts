import reference from "@/tests/reference/yields.json";
import { lines } from "./case";

/** A record of the table; numbers as it has them. */
export interface YieldRecord {
  readonly id: string;
  readonly source: string;
  readonly params: Readonly<Record<string, string | number>>;
  readonly yield_value?: string;
  readonly mean?: string;
  readonly sd?: string;
  readonly first_order_sd?: string;
  readonly worst_case?: readonly string[];
}

export const YIELD_TABLE: readonly YieldRecord[] = reference.cases;

/** A record as a netlist with one requirement; `out` is the trace that it is about. */
export interface YieldCase {
  readonly record: YieldRecord;
  readonly text: string;
}

const DRAWS = 20_000;

function head({ id }: YieldRecord): string {
  return lines(`title "${id}: yield"`, `draws ${DRAWS} seed 20261201`);
}

/** Percent of a share such as "1/20" or "0.01". */
function percent(share: string | number | undefined): string {
  const [over, under = 1] = String(share).split("/").map(Number);
  return `${Number(((100 * over!) / under).toPrecision(12))} %`;
}

function divider(record: YieldRecord, tolerance: string): string {
  const { R1, R2, eps } = record.params;
  const nominal = `${Number(R2)} / ${Number(R1) + Number(R2)} * 1 V`;
  return lines(
    head(record),
    `ground -- V1 : voltage 1 V -- in -- R1 : resistor ${R1} Ω ${tolerance} -- out -- R2 : resistor ${R2} Ω ${tolerance} -- ground`,
    "show out = out.v",
    ...(eps === undefined ? [] : [`require out within ${nominal} ± ${percent(eps)} in 1 % of draws`]),
  );
}

/** Equal resistors of one `let` in series: each of them is a part from the drawer. */
function series(record: YieldRecord): string {
  const { n, tol, dev } = record.params;
  const parts = Array.from({ length: Number(n) }, (_, i) => `R${i} : resistor R -- n${i}`);
  const path = ["ground -- I1 : current 1 mA -- top", ...parts].join(" -- ").replace(/n\d+$/u, "ground");
  return lines(
    head(record),
    `let R = 1 kΩ ± ${percent(tol)}`,
    path,
    "show out = top.v",
    `require out within ${Number(n)} V ± ${percent(dev)} in 1 % of draws`,
  );
}

/**
 * Log converter with an ideal amplifier and a transistor of a purely exponential law. ln Is is normal; the requirement names Is and
 * R outside any part, where they are nominal.
 */
function logConverter(record: YieldRecord): string {
  const { sigma_lnIS, tol_R, T, dev_V } = record.params;
  const R = tol_R === undefined ? "" : ` ± ${percent(tol_R)}`;
  return lines(
    head(record),
    `knob temperature = ${T} K`,
    `let spread = 0 ± ${sigma_lnIS} normal 1 sigma`,
    "let Is = 1 fA * exp(spread)",
    `let R = 10 kΩ${R}`,
    "model exponential : npn { Is = Is }",
    "model ideal : opamp { }",
    "ground -- V1 : voltage 1 V -- in -- R1 : resistor R -- sum",
    "Q1 : exponential { c = sum, b = ground, e = out }",
    "A1 : ideal { plus = ground, minus = sum, out = out }",
    "show out = out.v",
    `require out within -V_T * ln(1 V / (Is * R)) ± ${Number(dev_V) * 1000} mV in 1 % of draws`,
  );
}

function textOf(record: YieldRecord): string {
  const { tol, sigma } = record.params;
  if (/^MC[15]/u.test(record.id)) return divider(record, `± ${percent(tol)}`);
  if (record.id.startsWith("MC2")) return divider(record, `± ${percent(sigma)} normal 1 sigma`);
  return record.id.startsWith("MC3") ? series(record) : logConverter(record);
}

export const YIELDS: readonly YieldCase[] = YIELD_TABLE.map((record) => ({ record, text: textOf(record) }));
