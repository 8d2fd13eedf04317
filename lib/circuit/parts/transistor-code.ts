import type { AssemblyCode } from "../assembly-code";

export interface TransistorPlaces {
  /** Numbers of the voltages at its pins, and of ground. */
  readonly c: number;
  readonly b: number;
  readonly e: number;
  readonly ground: number;
  readonly sign: 1 | -1;
  /** Rows c, b, e by columns c, b, e. */
  readonly places: readonly number[];
}

/**
 * Writes the law of a transistor without leakage and high injection, linearised, as straight code: operation for operation what
 * `bipolarLaw` and `addTo` of its part do. `part` is the part's name in the code.
 */
export function writeTransistor(code: AssemblyCode, part: string, where: TransistorPlaces): void {
  const { c, b, e, ground, places } = where;
  const sign = where.sign === 1 ? "" : "-";
  const at = code.first(`${part}.at`);
  const [Is, eta] = [code.let(`${at}.Is`), code.first(`${at}.eta`)];
  const [forwardBase, reverseBase] = [code.let(`${at}.forwardBase`), code.let(`${at}.reverseBase`)];
  const [forwardEarly, reverseEarly] = [code.let(`${at}.forwardEarly`), code.let(`${at}.reverseEarly`)];
  const [vbe, vbc] = [code.first(`${part}.vbe`), code.first(`${part}.vbc`)];
  const vce = code.let(`${part}.vce`);
  const perVolt = code.let(`1/${eta}`);
  const { less: ef, whole: tf } = code.exponentials(`${vbe}/${eta}`);
  const { less: er, whole: tr } = code.exponentials(`${vbc}/${eta}`);
  const close = `${vce}>0?-${tf}*expm1(-(${vce}/${eta})):${tr}*expm1(${vce}/${eta})`;
  const transport = code.let(`${Is}*(Math.abs(${vce})>${eta}?${tf}-${tr}:${close})`);
  const early = code.let(`1-${vbc}*${forwardEarly}-${vbe}*${reverseEarly}`);
  const slopeF = code.let(`${Is}*${tf}*${perVolt}`);
  const slopeR = code.let(`${Is}*${tr}*${perVolt}`);
  const ibF = code.let(`${forwardBase}*${tf}*${perVolt}`);
  const ibR = code.let(`${reverseBase}*${tr}*${perVolt}`);
  const reverse = code.let(`${reverseBase}*${er}`);
  const lawB = code.let(`${forwardBase}*${ef}+${reverse}`);
  const lawC = code.let(`${transport}*${early}-${reverse}`);
  const icF = code.let(`${slopeF}*${early}+${transport}*(0-${reverseEarly})`);
  const icR = code.let(`-${slopeR}*${early}+${transport}*(0-${forwardEarly})-${ibR}`);
  const be = code.let(`${sign}${code.across(b, e)}-${vbe}`);
  const bc = code.let(`${sign}${code.across(b, c)}-${vbc}`);
  const ic = code.let(`${sign}(${lawC}+${icF}*${be}+${icR}*${bc})`);
  const ib = code.let(`${sign}(${lawB}+${ibF}*${be}+${ibR}*${bc})`);
  code.flow(c, ground, ic);
  code.flow(b, ground, ib);
  code.flow(e, ground, code.let(`-${ic}-${ib}`));
  const intoC = code.let(`${eta}*(Math.abs(${icF})+Math.abs(${icR}))`);
  const intoB = code.let(`${eta}*(Math.abs(${ibF})+Math.abs(${ibR}))`);
  code.widen(c, intoC);
  code.widen(b, intoB);
  code.widen(e, `${intoC}+${intoB}`);
  code.slope(places[0]!, "-", icR);
  code.slope(places[1]!, "+", `${icF}+${icR}`);
  code.slope(places[2]!, "-", icF);
  code.slope(places[3]!, "-", ibR);
  code.slope(places[4]!, "+", `${ibF}+${ibR}`);
  code.slope(places[5]!, "-", ibF);
  code.slope(places[6]!, "+", `${icR}+${ibR}`);
  code.slope(places[7]!, "-", `(${icF}+${icR}+${ibF}+${ibR})`);
  code.slope(places[8]!, "+", `${icF}+${ibF}`);
}
