/**
 * Every code a netlist can be answered with, and its title for the reference. Codes are stable: a number is never given to
 * another problem. The message of a diagnostic says what is wrong at its place; the title says which kind of problem it is.
 */
export const CATALOGUE = {
  TXT1: "A character the language does not use",
  TXT2: "A text that is not closed",
  TXT3: "A number beyond reach",

  FRM1: "A line that begins no statement",
  FRM2: "Something else belongs here",
  FRM3: "A value is missing",
  FRM4: "Something is left over",
  FRM5: "A bracket is not closed",
  FRM6: "A statement this server does not speak yet",
  FRM7: "A path out of order",
  FRM8: "A comparison out of place",
  FRM9: "A statement given twice",
  FRM10: "A pin wants the name of a net",
  FRM11: "An element in the wrong form",
  FRM12: "A function with the wrong number of values",

  NAM1: "A name that is already taken",
  NAM2: "A word of the language used as a name",
  NAM3: "An unknown name",
  NAM4: "A name that means something else here",
  NAM5: "An unknown kind or model",
  NAM6: "An unknown pin or parameter",
  NAM7: "A signal that does not exist",
  NAM8: "A pin or parameter given twice",
  NAM9: "A value defined by itself",
  NAM10: "An unknown function",
  NAM11: "A value that must not move",

  UNI1: "An unknown unit",
  UNI2: "A prefix without its unit",
  UNI3: "A unit that does not fit its place",
  UNI4: "Two units that do not go together",
  UNI5: "A pure number is wanted",
  UNI6: "A point on the Celsius scale used as a difference",
  UNI7: "A power of a quantity that can be read in two ways",
  UNI8: "A value out of bounds",
  UNI9: "A value that is no number",
  UNI10: "A tolerance that cannot be used",

  WIR1: "A net with one connection",
  WIR2: "A net with no path to ground",
  WIR3: "A loop of voltage elements",
  WIR4: "A cut of current elements",
  WIR5: "A pin left open",
  WIR6: "An amplifier without feedback",
  WIR7: "A shorted element",
  WIR8: "Two drivers on a net",
  WIR9: "Nothing is wired",

  PLN1: "A sweep of something that is no knob",
  PLN2: "A knob swept twice",
  PLN3: "A range without decades",
  PLN4: "A count that is no whole number",
  PLN5: "A range that leads nowhere",
  PLN6: "A value outside its knob's range",
  PLN7: "A range upside down",
  PLN8: "Nothing is shown",
  PLN9: "A sweep that leads a value out of its bounds",

  CAP1: "The text is too long",
  CAP2: "An expression nested too deeply",
  CAP3: "Too many elements",
  CAP4: "Too many points",
  CAP5: "Too many values to keep",
  CAP6: "More problems than are listed",
} as const;

export type Code = keyof typeof CATALOGUE;
