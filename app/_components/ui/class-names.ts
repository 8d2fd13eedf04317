/** Joins the class names that hold; false, null and undefined fall out. */
export function classNames(...names: readonly (string | false | null | undefined)[]): string {
  return names.filter(Boolean).join(" ");
}
