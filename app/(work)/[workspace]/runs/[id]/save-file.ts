/** Has the browser save what an address answers, under that name. */
export function saveFrom(href: string, name: string): void {
  const link = document.createElement("a");
  link.href = href;
  link.download = name;
  link.click();
}

/** Has the browser save `content` under that name. */
export function saveBlob(content: Blob, name: string): void {
  const href = URL.createObjectURL(content);
  saveFrom(href, name);
  // The browser has taken hold of it by then.
  setTimeout(() => URL.revokeObjectURL(href), 10_000);
}
