import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { AxeBuilder } from "@axe-core/playwright";
import {
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  chromium,
  type Page,
} from "playwright-core";
import { expect } from "vitest";
import { DEMO_PEOPLE } from "@/db/demo-people";

/** Debian's browser; CHROME_PATH names another one. */
export const BROWSER = process.env.CHROME_PATH || "/usr/bin/chromium";
export const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

/** Where pictures of failed or shown pages go; git does not see it. */
const PICTURES = ".test/pictures";

export const WORKSPACE = "north-bench";

/** A person of the demo by their first name. */
export type Who = "vera" | "erik" | "rosa" | "adam";

/** The service under test. (Not BASE_URL: vitest sets that one itself.) `npm test` starts one; a demo that runs serves as well: E2E_URL=http://localhost:4300 */
export function baseUrl(): string {
  const url = process.env.E2E_URL;
  if (!url)
    throw new Error("E2E_URL is missing. Run `npm test -- --only e2e`, or name a running demo in E2E_URL.");
  return url;
}

export function launchBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: BROWSER, args: FLAGS });
}

/** A page and what went wrong in it. */
export interface Opened {
  readonly page: Page;
  /** Errors thrown in the page and errors on its console, such as a breach of the content policy. */
  readonly faults: string[];
}

/**
 * Lets an opened page put what was streamed to it in its place: until then its words stand there twice, once hidden. A page that
 * is not found keeps the hidden part of what it would have been.
 */
function awaitStreamed(page: Page): void {
  const streamed = page.locator('div[hidden][id^="S:"]').first();
  const settled = () => streamed.waitFor({ state: "detached", timeout: 2000 }).catch(() => undefined);
  const goto = page.goto.bind(page);
  page.goto = async (url, options) => {
    const response = await goto(url, options);
    await settled();
    return response;
  };
  const reload = page.reload.bind(page);
  page.reload = async (options) => {
    const response = await reload(options);
    await settled();
    return response;
  };
}

/** A page with cookies of its own. `options.colorScheme` and `options.viewport` choose how it looks. */
export async function openPage(browser: Browser, options: BrowserContextOptions = {}): Promise<Opened> {
  const context = await browser.newContext({
    baseURL: baseUrl(),
    viewport: { width: 1280, height: 800 },
    ...options,
  });
  return openIn(context);
}

const signedIn = new WeakMap<Browser, Map<Who, BrowserContext>>();

/**
 * An empty page of somebody who has signed in. All pages of one person share cookies and what was fetched: the editor comes once a file,
 * not once a test. Those left open by the tests before are closed by `closePages`.
 */
export async function openPageAs(browser: Browser, who: Who): Promise<Opened> {
  const contexts = signedIn.get(browser) ?? new Map<Who, BrowserContext>();
  signedIn.set(browser, contexts);
  const known = contexts.get(who);
  if (known !== undefined) return openIn(known);
  const opened = await openPage(browser);
  await signIn(opened.page, who);
  contexts.set(who, opened.page.context());
  return opened;
}

/** Closes every page of `openPageAs`, and keeps who has signed in. For after each test. */
export async function closePages(browser: Browser): Promise<void> {
  const pages = [...(signedIn.get(browser)?.values() ?? [])].flatMap((context) => context.pages());
  await Promise.all(pages.map((page) => page.close()));
}

async function openIn(context: BrowserContext): Promise<Opened> {
  const page = await context.newPage();
  page.setDefaultTimeout(20_000);
  awaitStreamed(page);
  const faults: string[] = [];
  page.on("pageerror", (error) => faults.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") faults.push(message.text());
  });
  return { page, faults };
}

/** Sessions that the files share, by service and person: a form sent once does for all of them. Git does not see it. */
const SESSIONS = ".test/sessions.json";
const COOKIE = /sweepwright-session/;

type Cookies = Awaited<ReturnType<BrowserContext["cookies"]>>;

/** Sessions kept by earlier files; none where they cannot be read. */
function keptSessions(): Record<string, Cookies> {
  try {
    return JSON.parse(readFileSync(SESSIONS, "utf8"));
  } catch {
    return {};
  }
}

/** Signs in, by the session of an earlier file where it still lives, and waits for the workspace's home. */
export async function signIn(page: Page, who: Who): Promise<void> {
  const key = `${baseUrl()} ${who}`;
  const kept = keptSessions()[key];
  if (kept !== undefined) {
    await page.context().addCookies(kept);
    await page.goto(`/${WORKSPACE}`);
    if (new URL(page.url()).pathname === `/${WORKSPACE}`) return;
    await page.context().clearCookies({ name: COOKIE });
  }
  await signInAfresh(page, who);
  const cookies = (await page.context().cookies()).filter(({ name }) => COOKIE.test(name));
  mkdirSync(".test", { recursive: true });
  writeFileSync(SESSIONS, JSON.stringify({ ...keptSessions(), [key]: cookies }));
}

/** Signs in by the form, for a session of its own, and waits for the workspace's home. */
export async function signInAfresh(page: Page, who: Who): Promise<void> {
  await page.goto("/sign-in");
  await fillSignIn(page, who);
  await page.waitForURL(`**/${WORKSPACE}`);
}

/** Fills and sends the sign-in form that is open. */
export async function fillSignIn(page: Page, who: Who): Promise<void> {
  await page.getByLabel("E-mail").fill(emailOf(who));
  await page.getByLabel("Password").fill(process.env.SWEEPWRIGHT_DEMO_PASSWORD || "log-ratio-bench-7");
  await page.getByRole("button", { name: "Sign in" }).click();
}

function emailOf(who: Who): string {
  const person = DEMO_PEOPLE.find(({ email }) => email.startsWith(`${who}.`));
  if (person === undefined) throw new Error(`Nobody in the demo is called ${who}.`);
  return person.email;
}

/** Keeps a picture of the whole page, or of what the window shows, in .test/pictures/NAME.png; its path. */
export async function picture(page: Page, name: string, fullPage = true): Promise<string> {
  mkdirSync(PICTURES, { recursive: true });
  const path = `${PICTURES}/${name}.png`;
  await page.screenshot({ path, fullPage });
  return path;
}

/** Fails with every breach of WCAG 2.2 A and AA that axe finds, each with its places. `leaveOut` names parts made by others. */
export async function expectAccessible(page: Page, leaveOut: readonly string[] = []): Promise<void> {
  let axe = new AxeBuilder({ page }).withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"]);
  for (const selector of leaveOut) axe = axe.exclude(selector);
  const { violations } = await axe.analyze();
  const breaches = violations.map(({ id, help, nodes }) => ({
    id,
    help,
    at: nodes.map((node) => node.html),
  }));
  expect(breaches).toEqual([]);
}

/** Fails when the page is wider than its window, as it must not be on a phone. */
export async function expectNoSidewaysScroll(page: Page): Promise<void> {
  const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(overflow).toBeLessThanOrEqual(0);
}

/** The looks in which every page is judged: a wide window, a tablet at night, a telephone. */
export const LOOKS = [
  { colorScheme: "light", width: 1920 },
  { colorScheme: "dark", width: 1024 },
  { colorScheme: "light", width: 360 },
] as const;

/** Gives a page a theme and a width, as when the reader changes them. */
export async function look(
  page: Page,
  { colorScheme, width }: { readonly colorScheme: "light" | "dark"; readonly width: number },
): Promise<void> {
  await page.emulateMedia({ colorScheme });
  await page.setViewportSize({ width, height: 900 });
}
