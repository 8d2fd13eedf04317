/** V: the fixed voltages are spread over as much, so that a path meets no branching point (with probability one). */
const SPREAD = 0.5;

/** Fills in fixed voltages that have nothing to do with each other: the fractions of multiples of the golden ratio. Each variant has others. */
export function scatter(origin: Float64Array, variant = 0): void {
  const first = variant * origin.length;
  origin.forEach((_, j) => {
    origin[j] = SPREAD * (((first + j + 1) * 0.6180339887498949) % 1);
  });
}
