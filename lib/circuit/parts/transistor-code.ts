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
  const at = code.let(`${part}.at`);
  const [Is, eta] = [code.let(`${at}.Is`), code.let(`${at}.eta`)];
  const [forwardBase, reverseBase] = [code.let(`${at}.forwardBase`), code.let(`${at}.reverseBase`)];
  const [forwardEarly, reverseEarly] = [code.let(`${at}.forwardEarly`), code.let(`${at}.reverseEarly`)];
  const [vbe, vbc, vce] = [code.let(`${part}.vbe`), code.let(`${part}.vbc`), code.let(`${part}.vce`)];
  const [yf, yr, y] = [code.let(`${vbe}/${eta}`), code.let(`${vbc}/${eta}`), code.let(`${vce}/${eta}`)];
  const ef = code.let(`expm1(${yf})`);
  const er = code.let(`${yr}<-40?-1:expm1(${yr})`);
  const tf = code.let(`${yf}<-1?exp(${yf}):${ef}+1`);
  const tr = code.let(`${yr}<-1?exp(${yr}):${er}+1`);
  const close = `${y}>0?-${tf}*expm1(-${y}):${tr}*expm1(${y})`;
  const transport = code.let(`${Is}*(Math.abs(${y})>1?${tf}-${tr}:${close})`);
  const early = code.let(`1-${vbc}*${forwardEarly}-${vbe}*${reverseEarly}`);
  const slopeF = code.let(`${Is}*${tf}/${eta}`);
  const slopeR = code.let(`${Is}*${tr}/${eta}`);
  const ibF = code.let(`${forwardBase}*${tf}/${eta}`);
  const ibR = code.let(`${reverseBase}*${tr}/${eta}`);
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
  code.slope(places[0]!, "-=", icR);
  code.slope(places[1]!, "+=", `${icF}+${icR}`);
  code.slope(places[2]!, "-=", icF);
  code.slope(places[3]!, "-=", ibR);
  code.slope(places[4]!, "+=", `${ibF}+${ibR}`);
  code.slope(places[5]!, "-=", ibF);
  code.slope(places[6]!, "+=", `${icR}+${ibR}`);
  code.slope(places[7]!, "-=", `(${icF}+${icR}+${ibF}+${ibR})`);
  code.slope(places[8]!, "+=", `${icF}+${ibF}`);
}
