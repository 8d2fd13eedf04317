import type { Locator, Page } from "playwright-core";

/** Steps of the Tab key before something counts as out of reach. */
const FAR = 160;

/** Counts presses of a mouse or a finger in the page, now and on every page to come; gives the count. */
export async function countPresses(page: Page): Promise<() => number> {
  let presses = 0;
  await page.exposeFunction("pressedByHand", () => {
    presses += 1;
  });
  await page.addInitScript(() => {
    const tell = (window as unknown as { pressedByHand: () => void }).pressedByHand;
    for (const kind of ["pointerdown", "mousedown", "touchstart"]) window.addEventListener(kind, tell, true);
  });
  return () => presses;
}

/** Moves the focus there by the Tab key alone. */
export async function tabTo(page: Page, wanted: Locator): Promise<void> {
  await wanted.waitFor();
  for (let steps = 0; steps < FAR; steps += 1) {
    if (await wanted.evaluate((one) => one === document.activeElement)) return;
    await page.keyboard.press("Tab");
  }
  throw new Error(`Nothing called ${wanted} within ${FAR} steps of the Tab key.`);
}

/** Goes there by Tab and presses a key on it. */
export async function pressAt(page: Page, wanted: Locator, key = "Enter"): Promise<void> {
  await tabTo(page, wanted);
  await page.keyboard.press(key);
}

/** Opens "Find or do…", looks for something, and waits until the service has answered too. */
export async function lookFor(page: Page, words: string): Promise<Locator> {
  await page.keyboard.press("Control+k");
  const dialog = page.getByRole("dialog", { name: "Find or do" });
  await dialog.waitFor();
  await page.keyboard.type(words);
  await dialog.locator("[data-find=settled]").waitFor();
  return dialog;
}

/** Takes what stands first for some words under "Find or do…". */
export async function findAndTake(page: Page, words: string): Promise<void> {
  const dialog = await lookFor(page, words);
  await page.keyboard.press("Enter");
  await dialog.waitFor({ state: "hidden" });
}
