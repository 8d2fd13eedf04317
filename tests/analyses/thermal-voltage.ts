/** kT/q at 298.15 K, V, to the digits of a double; exact SI values of k and q, as tests/reference/constants.json has it. */
export const THERMAL_VOLTAGE_25 = 0.02569257912108585;
