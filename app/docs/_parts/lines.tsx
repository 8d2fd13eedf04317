const CLASS =
  "mt-3 overflow-x-auto border-l-2 bg-wash py-2 pr-3 pl-4 text-[0.8125rem] leading-6 print:whitespace-pre-wrap";

/** Lines for a terminal or a file, as they are typed. */
export function Lines({ text }: { readonly text: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: text that scrolls sideways must be reachable from the keyboard
    <pre tabIndex={0} className={CLASS}>
      {text}
    </pre>
  );
}
