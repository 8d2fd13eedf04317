/**
 * The path of this service that `value` names, or null: nothing that a browser would read as another host's address
 * ("//host", "/\host", control characters), and not the sign-in page itself.
 */
export function localPath(value: string | string[] | undefined): string | null {
  if (typeof value !== "string" || !/^\/(?![/\\])[\x21-\x7e]*$/.test(value) || value.includes("\\"))
    return null;
  return value.startsWith("/sign-in") ? null : value;
}
