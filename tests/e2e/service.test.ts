import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import {
  baseUrl,
  expectAccessible,
  expectNoSidewaysScroll,
  launchBrowser,
  openPage,
  signIn,
} from "./harness";

let browser: Browser;

beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser.close());

/** The content policy of an answer, rule by rule. */
function policyOf(answer: Response): Map<string, string[]> {
  const header = answer.headers.get("content-security-policy") ?? "";
  return new Map(header.split("; ").map((rule) => [rule.split(" ")[0]!, rule.split(" ").slice(1)]));
}

describe("every page", () => {
  it("carries a content policy with a nonce of its own, and its scripts carry that nonce", async () => {
    const first = await fetch(`${baseUrl()}/sign-in`);
    const second = await fetch(`${baseUrl()}/sign-in`);
    const scripts = policyOf(first).get("script-src") ?? [];
    const nonce = /^'nonce-(.{20,})'$/.exec(scripts.find((word) => word.startsWith("'nonce-")) ?? "")?.[1];
    expect(nonce).toBeDefined();
    expect(scripts).toContain("'strict-dynamic'");
    expect(scripts).not.toContain("'unsafe-inline'");
    expect(scripts).not.toContain("'unsafe-eval'");
    expect(policyOf(second).get("script-src")).not.toEqual(scripts);
    const tags = [...(await first.text()).matchAll(/<script\b[^>]*>/g)].map((found) => found[0]);
    expect(tags.length).toBeGreaterThan(0);
    expect(tags.filter((tag) => !tag.includes(`nonce="${nonce}"`))).toEqual([]);
  });

  it("carries it also when a browser fetches it ahead of a visit", async () => {
    const ahead = await fetch(`${baseUrl()}/sign-in`, { headers: { purpose: "prefetch" } });
    expect(policyOf(ahead).get("default-src")).toEqual(["'self'"]);
  });

  it("cannot be framed, is not sniffed and tells no other site where it came from", async () => {
    for (const path of ["/", "/sign-in", "/api/health"]) {
      const { headers } = await fetch(baseUrl() + path);
      expect(headers.get("x-frame-options")).toBe("DENY");
      expect(headers.get("x-content-type-options")).toBe("nosniff");
      expect(headers.get("referrer-policy")).toBe("strict-origin-when-cross-origin");
      expect(headers.get("x-powered-by")).toBeNull();
    }
  });
});

describe("the server", () => {
  it("fetches and scales no pictures for others", async () => {
    const query = new URLSearchParams({ url: "/icon.svg", w: "64", q: "75" });
    expect((await fetch(`${baseUrl()}/_next/image?${query}`)).status).toBe(404);
  });

  it("answers an address that is none with 400", async () => {
    expect((await fetch(`${baseUrl()}/api/v1/runs/%E0%A4%A`)).status).toBe(400);
  });
});

describe("the API", () => {
  it("answers nothing that a browser would run", async () => {
    const rules = policyOf(await fetch(`${baseUrl()}/api/health`));
    expect(rules.get("default-src")).toEqual(["'none'"]);
    expect(rules.get("script-src")).toBeUndefined();
  });
});

describe.each(["/", "/sign-in"])("the page %s", (path) => {
  it.each(["light", "dark"] as const)(
    "opens in the browser without a fault and can be read by all, %s",
    async (colorScheme) => {
      const { page, faults } = await openPage(browser, { colorScheme });
      await page.goto(path);
      await page.waitForLoadState("networkidle");
      await expectAccessible(page);
      expect(faults).toEqual([]);
      await page.context().close();
    },
  );

  it.each([360, 1920])("fits a window %i pixels wide", async (width) => {
    const { page } = await openPage(browser, { viewport: { width, height: 800 } });
    await page.goto(path);
    await expectNoSidewaysScroll(page);
    await page.context().close();
  });
});

describe("the door", () => {
  it("sends a stranger from a workspace to the sign-in", async () => {
    const { page } = await openPage(browser);
    await page.goto("/north-bench");
    expect(new URL(page.url()).pathname).toBe("/sign-in");
    await page.context().close();
  });

  it("lets a person of the demo in, who sees the runs of the examples", async () => {
    const { page, faults } = await openPage(browser);
    await signIn(page, "vera");
    await page.getByRole("heading", { level: 1 }).waitFor();
    await page.locator('a[href*="/north-bench/runs/"]').first().waitFor();
    await expectAccessible(page);
    expect(faults).toEqual([]);
    await page.context().close();
  });
});
