import type { Problem } from "./problems";

const head = [
  "ground -- V1 : voltage k -- in -- R1 : resistor 1 kΩ ± 1 % -- ground",
  "knob k = 1 V",
  "knob l = 1 V",
  "sweep k from 1 mV to 1 V, 1 per decade",
  "sweep temperature over 0 °C, 25 °C",
].join("\n");

/** A contract in a netlist that has nothing else to complain about: a sweep of k over three decades, of temperature over two. */
function within(text: string): string {
  return `${head}\nshow out = in.v, fixed = 1 V, l = 2 * l\n${text}\n`;
}

/** The same without a sweep. */
function still(text: string): string {
  return `ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground\nshow out = in.v\n${text}\n`;
}

export const CONTRACT_PROBLEMS: readonly Problem[] = [
  { code: "FRM2", text: within("read «=» highest(out)") },
  { code: "FRM2", text: within("read a «highest»(out)") },
  { code: "FRM2", text: within('read a = highest(out) «as» "a"'), says: "`require`" },
  { code: "FRM2", text: within("require ou«t»"), says: "rising" },
  { code: "FRM2", text: within("require out within 1 «V»"), says: "± 1 %" },
  { code: "FRM2", text: within("require out between 1 V «to» 2 V") },
  { code: "FRM2", text: within("require out <= 1 V for k «from» 1 V .. 2 V") },
  { code: "FRM2", text: within("require out <= 1 V for k in 1 V «to» 2 V") },
  { code: "FRM2", text: within("require out <= 1 V at k «in» 1 V") },
  { code: "FRM2", text: within("require out <= 1 V in 95 % «draws»") },
  { code: "FRM2", text: within("require out <= 1 V as «name»") },
  { code: "FRM1", text: within("require out <= 1 V\n  «at» k = 1 V"), says: "to the line before" },
  { code: "FRM4", text: within('require out <= 1 V as "name" «at» k = 1 V') },
  { code: "FRM8", text: within("require 0 V <= out «<=» 1 V"), says: "between" },
  { code: "FRM12", text: within("require «highest(out, 1 V)» <= 2 V") },
  { code: "FRM12", text: within("require «reach(out)» <= 1 V") },
  { code: "FRM12", text: within("require «at(out)» <= 1 V"), says: "KNOB = value" },
  { code: "NAM1", text: within("read «out» = highest(in.v)") },
  { code: "NAM1", text: within("read «k» = highest(in.v)") },
  { code: "NAM1", text: within("require «l» + out <= 2 V"), says: "both a knob and a trace" },
  { code: "NAM1", text: within("read a = highest(out)\nread «a» = lowest(out)") },
  { code: "NAM3", text: within("require «outt» <= 1 V"), mended: within("require out <= 1 V") },
  {
    code: "NAM3",
    text: within("read slope = per_decade(out)\nrequire «slop» <= 1 V"),
    mended: within("read slope = per_decade(out)\nrequire slope <= 1 V"),
  },
  {
    code: "NAM3",
    text: within("require out <= 1 V at «kk» = 1 V"),
    mended: within("require out <= 1 V at k = 1 V"),
  },
  { code: "NAM3", text: within("show y = «nowhere».v\nrequire y <= 1 V"), says: "declare it" },
  { code: "NAM3", text: within("read a = highest(«nowhere».v)\nrequire a <= 1 V") },
  { code: "FRM3", text: within("read a «=»\nrequire a <= 1 V") },
  { code: "PLN4", text: within("draws «0» seed 1\nrequire out <= 1 V in 5 % of draws") },
  { code: "NAM4", text: within("read a = highest(out)\nlet b = «a»") },
  {
    code: "NAM10",
    text: within("require «highst»(out) <= 1 V"),
    mended: within("require highest(out) <= 1 V"),
  },
  { code: "NAM11", text: within("require out <= 1 V at k = «l»") },
  { code: "UNI3", text: within("require out <= 1 V at k = «1 A»") },
  { code: "UNI3", text: within("require out within 1 V ± «1 A»") },
  { code: "UNI4", text: within("require «out <= 1 A»") },
  { code: "UNI4", text: within("require «out <= 1»"), mended: within("require out <= 1 V") },
  { code: "UNI4", text: within("require error_from(«out, 1 A») <= 1 V") },
  {
    code: "UNI4",
    text: within("require decades_where(«out < 1») >= 1"),
    mended: within("require decades_where(out < 1 V) >= 1"),
  },
  {
    code: "UNI6",
    text: within("show warm = temperature\nrequire warm within 25 °C ± «50 °C»"),
    mended: within("show warm = temperature\nrequire warm within 25 °C ± 50 K"),
  },
  {
    code: "UNI10",
    text: within("require out within 1 V ± «1»"),
    mended: within("require out within 1 V ± 1 V"),
  },

  {
    code: "CON1",
    text: within("require out <= 1 V at k = «20 mV»"),
    mended: within("require out <= 1 V at k = 10 mV"),
    says: "the nearest is 10 mV",
  },
  {
    code: "CON1",
    text: within("require out <= 1 V at temperature = «50 °C»"),
    mended: within("require out <= 1 V at temperature = 25 °C"),
  },
  { code: "CON1", text: within("require out <= 1 V for k in «2 V .. 3 V»") },
  { code: "CON1", text: within("require out <= 1 V at l = «2 V»"), says: "not swept" },
  { code: "CON1", text: within("require out <= 1 V at «R1» = 2 V"), says: "an element" },
  { code: "CON1", text: within("require out <= 1 V at k = 1 V «at k = 10 mV»") },
  {
    code: "CON1",
    text: within("require at(out, k = «2 V») <= 1 V"),
    mended: within("require at(out, k = 1 V) <= 1 V"),
  },
  {
    code: "CON1",
    text: within("read a = deviation(out) for k in 1 mV .. 10 mV\nrequire «a» <= 1 V at k = 1 V"),
    says: "every reading used",
  },
  {
    code: "CON2",
    text: within("require out <= 1 V for k in «1 V .. 1 mV»"),
    mended: within("require out <= 1 V for k in 1 mV .. 1 V"),
  },
  {
    code: "CON2",
    text: within("require out between «1 V and 1 mV»"),
    mended: within("require out between 1 mV and 1 V"),
  },
  { code: "CON3", text: within("read a = highest(out)\nrequire highest(«a») <= 1 V"), says: "already" },
  { code: "CON3", text: within("require mean(«2 V») <= 1 V") },
  { code: "CON4", text: within("require decades_where(«out») >= 1") },
  { code: "CON5", text: still("read a = «per_unit(out)»") },
  { code: "CON5", text: still("read a = «decades_where(out < 1 V)»") },
  { code: "CON5", text: within("read a = «per_decade(out)» at k = 1 V"), says: "widen it" },
  {
    code: "CON5",
    text: still("knob m = 1 V\nsweep m from -1 V to 1 V, 3 points\nread a = «per_decade(out)»"),
    says: "crosses zero",
  },
  { code: "CON6", text: within("read a = «out - 1 V»"), says: "highest(…)" },
  { code: "CON6", text: within("read a = reach(out, «k»)") },
  { code: "CON7", text: within("require «k» <= 1 V") },
  { code: "CON7", text: within("read a = «1 V + 1 V»") },
  { code: "CON8", text: within("require out <= 1 V in «95 %» of draws"), says: "draws 400" },
  { code: "CON8", text: within("draws 9 seed 1\nrequire out <= 1 V in «0 %» of draws") },
  {
    code: "CON8",
    text: within("draws 9 seed 1\nrequire out <= 1 V in «95» of draws"),
    mended: within("draws 9 seed 1\nrequire out <= 1 V in 95 % of draws"),
  },
  { code: "CON9", text: within("require out within 1 V ± «-1 %»") },
  { code: "CON10", text: within("show a = «highest»(out)") },
  { code: "CON10", text: within("let a = «mean»(in.v)") },
  { code: "CON11", text: within("require «highest(out)» rising") },
  { code: "CON11", text: within("require «out» falling at k = 1 V") },
  { code: "CON12", text: within("read a = highest(out) + «b»\nread b = lowest(out)") },
  { code: "CON12", text: within("read a = highest(out) + «a»") },
  { code: "CON13", text: within("read a = highest(out)\nrequire a <= 1 V «at k = 1 V»") },
  { code: "CAP4", text: within("«draws 200000 seed 1»\nrequire out <= 1 V"), says: "draw fewer" },
  {
    code: "CAP7",
    text: within(
      `${Array.from({ length: 1000 }, (_, i) => `require out <= ${i + 1} V`).join("\n")}\n«read a = highest(out)»`,
    ),
  },
  {
    code: "CAP8",
    text: still(
      `knob m = 1 V\nsweep m from 0 V to 1 V, 900000 points\nrequire out <= 1 V\n«require ${"out + ".repeat(30)}out <= 1 V»`,
    ),
  },
  { code: "CON14", text: within("require out <= 1 V\n«require out<=1 V»") },
  { code: "CON14", text: within('require out <= 1 V as "a"\nrequire out <= 2 V as «"a"»') },
];
