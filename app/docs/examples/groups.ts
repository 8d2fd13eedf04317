/** The examples by what they are for, in the order in which one reads them: names of files without their ending. */
export const GROUPS: readonly {
  readonly title: string;
  readonly about: string;
  readonly names: readonly string[];
}[] = [
  {
    title: "Converters",
    about: "A signal becomes its logarithm, or its exponential.",
    names: [
      "diode-log-converter",
      "transistor-log-converter",
      "optical-power-meter",
      "limiting-chain",
      "antilog-converter",
      "reversed-input",
    ],
  },
  {
    title: "Ratio meters",
    about: "Two logarithms subtract, and what both share drops out.",
    names: ["log-ratio-head", "absorbance-head", "uncompensated-head"],
  },
  {
    title: "Multipliers",
    about: "Logarithms add; their sum is turned back.",
    names: ["one-quadrant-multiplier", "multiplier-divider", "gain-cell"],
  },
  {
    title: "Dividers",
    about: "One logarithm is taken from another and turned back.",
    names: ["one-quadrant-divider"],
  },
  {
    title: "Roots",
    about: "Half of a logarithm is the logarithm of the square root.",
    names: ["square-root-extractor", "true-rms"],
  },
  {
    title: "Helpers",
    about: "What such circuits stand on: references, mirrors, triggers, sensors.",
    names: [
      "current-mirrors",
      "bandgap-start-up",
      "thermometer-pair",
      "level-detector",
      "schmitt-trigger",
      "solar-cell",
    ],
  },
];
