/**
 * Calls `then` when whoever sent a request has left, which for a busy service may have happened before anybody could listen: an event
 * that has been fired is told to nobody any more.
 */
export function whenGone({ signal }: Request, then: () => void): void {
  if (signal.aborted) then();
  else signal.addEventListener("abort", then, { once: true });
}
