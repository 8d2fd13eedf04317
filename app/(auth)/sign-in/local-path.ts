/**
 * The path of this service that `value` names, or null: nothing that a browser would read as another host's address
 * ("//host", "/\host", "/..//host", control characters), and not the sign-in page itself.
 */
export function localPath(value: string | string[] | undefined): string | null {
  if (typeof value !== "string" || !/^\/(?![/\\])[\x21-\x7e]*$/.test(value) || value.includes("\\"))
    return null;
  // What is left of it once dots are resolved, as a browser does before it goes there.
  const path = new URL(value, "http://local.invalid").pathname;
  return path.startsWith("//") || path.startsWith("/sign-in") ? null : value;
}
