import type { AssemblyCode } from "../assembly-code";
import type { Table } from "../table";
import { BASE_F, BASE_R, EARLY_F, EARLY_R, ETA, IS, PER_VOLT, RISE, VBC, VBE, VCE } from "./transistor-table";

export interface TransistorRow {
  readonly table: Table;
  readonly row: number;
  /** Numbers of the voltages at its pins. */
  readonly c: number;
  readonly b: number;
  readonly e: number;
  readonly sign: 1 | -1;
  /** Rows c, b, e by columns c, b, e. */
  readonly places: readonly number[];
}

/** Writes that a transistor is linearised at its actual voltages, as `settleTransistors`, and asks for its exponentials. */
export function askTransistor(code: AssemblyCode, { table, row, c, b, e, ...where }: TransistorRow): void {
  const sign = where.sign === 1 ? "" : "-";
  const [vbe, vbc, eta] = [
    code.figure(table, row, VBE),
    code.figure(table, row, VBC),
    code.figure(table, row, ETA),
  ];
  const first = code.firstTransistor + 2 * row;
  code.set(vbe, sign + code.across(b, e));
  code.set(vbc, sign + code.across(b, c));
  code.set(code.figure(table, row, VCE), sign + code.across(c, e));
  code.ask(first, `${vbe}/${eta}`);
  code.ask(first + 1, `${vbc}/${eta}`);
}

/** Writes a plain transistor at its actual voltages as straight code: operation for operation what `addTransistors` does. */
export function writeTransistor(code: AssemblyCode, { table, row, ...where }: TransistorRow): void {
  const { c, b, e, places } = where;
  const sign = where.sign === 1 ? "" : "-";
  const figure = (column: number) => code.figure(table, row, column);
  const [Is, perVolt, eta] = [figure(IS), figure(PER_VOLT), figure(ETA)];
  const first = code.firstTransistor + 2 * row;
  const { less: ef, whole: tf } = code.exponentials(first);
  const { less: er, whole: tr } = code.exponentials(first + 1);
  const [rise, vce] = [figure(RISE), figure(VCE)];
  const close = `${vce}>0?-${tf}*expm1(-(${vce}/${eta})):${tr}*expm1(${vce}/${eta})`;
  code.set(rise, `abs(${vce})>${eta}?${tf}-${tr}:(${close})`);
  const transport = code.let(`${Is}*${rise}`);
  const early = code.let(`1-${figure(VBC)}*${figure(EARLY_F)}-${figure(VBE)}*${figure(EARLY_R)}`);
  const ibF = code.let(`${figure(BASE_F)}*${tf}*${perVolt}`);
  const ibR = code.let(`${figure(BASE_R)}*${tr}*${perVolt}`);
  const reverse = code.let(`${figure(BASE_R)}*${er}`);
  const icF = code.let(`${Is}*${tf}*${perVolt}*${early}-${transport}*${figure(EARLY_R)}`);
  const icR = code.let(`-(${Is}*${tr}*${perVolt})*${early}-${transport}*${figure(EARLY_F)}-${ibR}`);
  const ic = code.let(`${sign}(${transport}*${early}-${reverse})`);
  const ib = code.let(`${sign}(${figure(BASE_F)}*${ef}+${reverse})`);
  const ie = code.let(`-${ic}-${ib}`);
  const intoC = code.let(`${eta}*(abs(${icF})+abs(${icR}))`);
  const intoB = code.let(`${eta}*(${ibF}+${ibR})`);
  code.leave(c, "+", ic, code.let(`abs(${ic})+${intoC}`));
  code.leave(b, "+", ib, code.let(`abs(${ib})+${intoB}`));
  code.leave(e, "+", ie, code.let(`abs(${ie})+(${intoC}+${intoB})`));
  const byB = code.let(`${icF}+${icR}`);
  const baseByB = code.let(`${ibF}+${ibR}`);
  code.slope(places[0]!, "-", icR);
  code.slope(places[1]!, "+", byB);
  code.slope(places[2]!, "-", icF);
  code.slope(places[3]!, "-", ibR);
  code.slope(places[4]!, "+", baseByB);
  code.slope(places[5]!, "-", ibF);
  code.slope(places[6]!, "+", `(${icR}+${ibR})`);
  code.slope(places[7]!, "-", `(${byB}+${baseByB})`);
  code.slope(places[8]!, "+", `(${icF}+${ibF})`);
}
