import { describe, expect, it } from "vitest";
import { arrive } from "@/lib/stack/arrival.mjs";

function request(method: string, url: string, headers: Record<string, string> = {}) {
  return { method, url, headers, socket: { remoteAddress: "192.0.2.7" } };
}

describe("a request that arrives", () => {
  const FORGED = {
    host: "bench.example",
    "x-forwarded-for": "198.51.100.1",
    "x-forwarded-host": "evil.example",
    "x-forwarded-proto": "https",
    forwarded: "for=198.51.100.1",
  };

  it("is believed nothing about its way when no proxy of ours stands before", () => {
    const one = request("POST", "/api/v1/runs", { ...FORGED });
    expect(arrive(one, false)).toBeNull();
    expect(one.headers).toEqual({ host: "bench.example", "x-forwarded-for": "192.0.2.7" });
  });

  it("keeps what our proxy says", () => {
    const one = request("POST", "/api/v1/runs", { ...FORGED });
    expect(arrive(one, true)).toBeNull();
    expect(one.headers).toEqual(FORGED);
  });

  it.each([
    ["GET", "/", null],
    ["GET", "/north-bench/runs?query=%25%", null],
    ["GET", "/%00", null],
    ["GET", "/%E0%A4%A", 400],
    ["GET", "/%", 400],
    ["GET", "http://evil.example/", 400],
    ["OPTIONS", "*", 400],
    ["TRACE", "/", 405],
    ["PROPFIND", "/", 405],
  ])("%s %s is answered with %j", (method, url, status) => {
    expect(arrive(request(method, url), false)).toBe(status);
  });
});
