/**
 * A current element drives its value from left to right whatever the voltage: the current in A that leaves the left net. Its
 * slope is exactly 0 and temperature does not enter. `share` is the part of the value that acts, 1 but while sources are ramped.
 */
export function drivenCurrent(amperes: number, share: number): number {
  return amperes * share;
}
