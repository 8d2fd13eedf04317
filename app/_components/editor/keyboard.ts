/** Whether the reader's machine is one of Apple's, whose keys are called and used otherwise. In a browser only. */
export function isApple(): boolean {
  return /Mac|iPhone|iPad/.test(navigator.platform);
}
