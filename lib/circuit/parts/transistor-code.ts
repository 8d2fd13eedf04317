import type { RowWriter } from "../row-writer";
import { BASE_F, BASE_R, EARLY_F, EARLY_R, ETA, IS, PER_VOLT, RISE, VBC, VBE, VCE } from "./transistor-table";

/** Columns of a transistor's numbers: pins, its sign, and the first of nine places. */
const [C, B, E, SIGN, PLACES] = [0, 1, 2, 3, 4] as const;

/** Writes that a transistor is linearised at its actual voltages, as `settleTransistors`, and asks for its exponentials. */
export function askTransistor(code: RowWriter): void {
  code.give(VBE, code.signed(SIGN, code.across(B, E)));
  code.give(VBC, code.signed(SIGN, code.across(B, C)));
  code.give(VCE, code.signed(SIGN, code.across(C, E)));
  code.ask(0, `${code.figure(VBE)}/${code.figure(ETA)}`);
  code.ask(1, `${code.figure(VBC)}/${code.figure(ETA)}`);
}

/** Writes a transistor at rest: operation for operation what `riseTransistors` and `addTransistors` do with one row. */
export function writeTransistor(code: RowWriter): void {
  const figure = (column: number) => code.figure(column);
  const [Is, perVolt, eta, rise, vce] = [
    figure(IS),
    figure(PER_VOLT),
    figure(ETA),
    figure(RISE),
    figure(VCE),
  ];
  const [ef, er, tf, tr] = [code.less(0), code.less(1), code.whole(0), code.whole(1)];
  const close = `${vce}>0?-${tf}*expm1(-(${vce}/${eta})):${tr}*expm1(${vce}/${eta})`;
  code.give(RISE, `abs(${vce})>${eta}?${tf}-${tr}:(${close})`);
  const transport = code.let(`${Is}*${rise}`);
  const early = code.let(`1-${figure(VBC)}*${figure(EARLY_F)}-${figure(VBE)}*${figure(EARLY_R)}`);
  const ibF = code.let(`${figure(BASE_F)}*${tf}*${perVolt}`);
  const ibR = code.let(`${figure(BASE_R)}*${tr}*${perVolt}`);
  const reverse = code.let(`${figure(BASE_R)}*${er}`);
  const icF = code.let(`${Is}*${tf}*${perVolt}*${early}-${transport}*${figure(EARLY_R)}`);
  const icR = code.let(`-(${Is}*${tr}*${perVolt})*${early}-${transport}*${figure(EARLY_F)}-${ibR}`);
  const ic = code.let(code.signed(SIGN, `${transport}*${early}-${reverse}`));
  const ib = code.let(code.signed(SIGN, `${figure(BASE_F)}*${ef}+${reverse}`));
  const ie = code.let(`-${ic}-${ib}`);
  const intoC = code.let(`${eta}*(abs(${icF})+abs(${icR}))`);
  const intoB = code.let(`${eta}*(${ibF}+${ibR})`);
  code.leave(C, ic, code.let(`abs(${ic})+${intoC}`));
  code.leave(B, ib, code.let(`abs(${ib})+${intoB}`));
  code.leave(E, ie, code.let(`abs(${ie})+(${intoC}+${intoB})`));
  const byB = code.let(`${icF}+${icR}`);
  const baseByB = code.let(`${ibF}+${ibR}`);
  code.slope(PLACES, "-", icR);
  code.slope(PLACES + 1, "+", byB);
  code.slope(PLACES + 2, "-", icF);
  code.slope(PLACES + 3, "-", ibR);
  code.slope(PLACES + 4, "+", baseByB);
  code.slope(PLACES + 5, "-", ibF);
  code.slope(PLACES + 6, "+", `${icR}+${ibR}`);
  code.slope(PLACES + 7, "-", `${byB}+${baseByB}`);
  code.slope(PLACES + 8, "+", `${icF}+${ibF}`);
}
