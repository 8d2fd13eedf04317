import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { readJson } from "@/lib/api/body";
import { alreadyHas } from "@/lib/api/etag";
import { json, route } from "@/lib/api/route";
import { requireSameOrigin } from "@/lib/api/same-origin";

beforeEach(() => void vi.stubEnv("NEXTAUTH_URL", "https://bench.example"));
afterEach(() => void vi.unstubAllEnvs());

function request(method: string, headers: Record<string, string>): Request {
  return new Request("https://bench.example/api/v1/runs", { method, headers });
}

describe("requireSameOrigin", () => {
  const cookie = "sweepwright-session=x";
  it.each([
    ["another site's page", { cookie, origin: "https://evil.example" }],
    ["another port", { cookie, origin: "https://bench.example:8443" }],
    ["plain http of the same host", { cookie, origin: "http://bench.example" }],
    ["an opaque origin", { cookie, origin: "null" }],
    ["no word of where from", { cookie }],
    ["a sibling site, by the browser's word", { cookie, "sec-fetch-site": "same-site" }],
    [
      "a forged fetch-site beside a foreign origin",
      { cookie, origin: "https://evil.example", "sec-fetch-site": "same-origin" },
    ],
  ])("refuses a change with cookies from %s", (_, headers) => {
    expect(() => requireSameOrigin(request("POST", headers))).toThrow(/own pages/);
  });

  it.each([
    ["POST", "our own page", { cookie, origin: "https://bench.example" }],
    [
      "POST",
      "our own page under the name it was asked by",
      { cookie, origin: "https://other.example", host: "other.example" },
    ],
    ["POST", "our own page without Origin", { cookie, "sec-fetch-site": "same-origin" }],
    ["POST", "anywhere without cookies", { origin: "https://evil.example" }],
    ["GET", "anywhere, when nothing changes", { cookie, origin: "https://evil.example" }],
  ])("lets %s from %s through", (method, _, headers) => {
    expect(() => requireSameOrigin(request(method, headers))).not.toThrow();
  });
});

describe("route", () => {
  const ask = async (answer: unknown) => {
    const response = await route(async () => answer)(request("GET", {}), { params: Promise.resolve({}) });
    return response.headers.get("cache-control");
  };

  it("lets no shared cache keep an answer, whoever made it", async () => {
    expect(await ask({ rows: [] })).toBe("private, no-store");
    expect(await ask(new Response("a page of sign-in"))).toBe("private, no-store");
    expect(await ask(new Response(null, { status: 302, headers: { location: "/" } }))).toBe(
      "private, no-store",
    );
  });

  it("leaves an answer what it says of itself", async () => {
    expect(await ask(json({}, { headers: { "cache-control": "private, no-cache" } }))).toBe(
      "private, no-cache",
    );
  });
});

describe("readJson", () => {
  const post = (body: BodyInit, type = "application/json") =>
    new Request("https://bench.example/x", {
      method: "POST",
      body,
      headers: { "content-type": type },
      duplex: "half",
    } as RequestInit);

  it("reads an object in UTF-8", async () => {
    expect(await readJson(post('{"text":"1 µA"}', "application/json; charset=utf-8"))).toEqual({
      text: "1 µA",
    });
  });

  it.each([
    ["text that is not declared as JSON", post("{}", "text/plain")],
    ["half an object", post('{"text":')],
    ["a list", post("[]")],
    ["null", post("null")],
    ["bytes that are no UTF-8", post(new Uint8Array([0x22, 0xff, 0x22]))],
  ])("refuses %s", async (_, given) => {
    await expect(readJson(given)).rejects.toMatchObject({ code: "invalid" });
  });

  it("refuses a body over 2 MiB without reading it to its end", async () => {
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 65_536;
        controller.enqueue(new Uint8Array(65_536).fill(0x20));
      },
    });
    await expect(readJson(post(endless))).rejects.toMatchObject({ code: "too large" });
    expect(sent).toBeLessThan(3 * 1024 * 1024);
  });
});

describe("alreadyHas", () => {
  // The examples of RFC 9110, 13.1.2 and the table of weak comparison of 8.8.3.2.
  it.each([
    ['"1"', '"1"', true],
    ['W/"1"', '"1"', true],
    ['W/"1"', 'W/"1"', true],
    ['W/"2"', 'W/"1"', false],
    ['"xyzzy", "r2d2xxxx", W/"1"', 'W/"1"', true],
    ["*", 'W/"1"', true],
  ])("If-None-Match: %s against %s is %s", (known, etag, same) => {
    expect(alreadyHas(request("GET", { "if-none-match": known }), etag)).toBe(same);
  });

  it("is false without the header", () => {
    expect(alreadyHas(request("GET", {}), '"1"')).toBe(false);
  });
});
