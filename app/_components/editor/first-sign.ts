/** What tells that somebody is at the page, before they can have done anything to the text. */
const SIGNS = ["pointermove", "pointerdown", "keydown", "focusin"] as const;
/** Ms after which it is taken for granted. */
const UNASKED = 6000;

/**
 * Calls `then` once, with the first sign that somebody is at the page, and at the latest after some seconds: what is large and only needed by
 * those who write then does not hold up the page that is to be read. At once where they are known to be, or where the address names a line. Gives the way to call it off.
 */
export function atFirstSign(then: () => void): () => void {
  const end = () => {
    clearTimeout(timer);
    for (const sign of SIGNS) window.removeEventListener(sign, begin, true);
  };
  const begin = () => {
    end();
    then();
  };
  // Whoever came by a link of another page of ours has pressed it.
  const isHere = navigator.userActivation?.hasBeenActive || window.location.hash !== "";
  const timer = setTimeout(begin, isHere ? 0 : UNASKED);
  for (const sign of SIGNS) window.addEventListener(sign, begin, { capture: true, passive: true });
  return end;
}
