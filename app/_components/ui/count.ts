/** A whole number with a narrow no-break space between groups of three digits: "145 200". */
export function formatCount(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, "\u202f");
}

/** A count with its noun in the right number: "1 netlist", "1 200 netlists". */
export function counted(count: number, noun: string): string {
  return `${formatCount(count)} ${count === 1 ? noun : `${noun}s`}`;
}
