/** A waiting time in words: "40 seconds", "3 minutes". Rounded up, so that nobody comes back too early. */
export function waitingTime(seconds: number): string {
  if (seconds < 90) return seconds === 1 ? "1 second" : `${Math.max(1, Math.ceil(seconds))} seconds`;
  return `${Math.ceil(seconds / 60)} minutes`;
}

/**
 * The sentence for a sign-in that was refused. `code` is what the credentials check threw: "too many:SECONDS" when the
 * account or the address is throttled. Anything else does not tell which of the two was wrong.
 */
export function refusal(code: string | null | undefined): string {
  const throttled = /^too many:(\d+)$/.exec(code ?? "");
  if (throttled !== null) {
    return `Too many attempts to sign in. Wait ${waitingTime(Number(throttled[1]))}, then try again.`;
  }
  if (code === "unavailable") return "Sign-in is not available at the moment. Try again in a minute.";
  return "This e-mail address and password do not belong together. Check both and try again.";
}
