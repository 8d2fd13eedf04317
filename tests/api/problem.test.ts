import { afterEach, describe, expect, it, vi } from "vitest";
import { problem } from "@/lib/api/problem";
import { AppError, type ErrorCode } from "@/lib/errors";

afterEach(() => vi.restoreAllMocks());

/** Status codes by their meaning in RFC 9110 (and RFC 6585 for 429). */
const STATUS: readonly (readonly [ErrorCode, number])[] = [
  ["invalid", 400],
  ["signed out", 401],
  ["not allowed", 403],
  ["not found", 404],
  ["conflict", 409],
  ["too large", 413],
  ["too many", 429],
  ["unavailable", 503],
];

describe("problem", () => {
  it.each(STATUS)("answers '%s' with %i, its sentence and its details (RFC 9457)", async (code, status) => {
    const response = problem(new AppError(code, "A sentence.", { latest: 3 }));
    expect(response.status).toBe(status);
    expect(response.headers.get("content-type")).toBe("application/problem+json");
    expect(await response.json()).toEqual({
      type: "about:blank",
      title: code,
      status,
      code,
      detail: "A sentence.",
      latest: 3,
    });
  });

  it("does not let details take the place of the members of RFC 9457", async () => {
    const body = await problem(
      new AppError("conflict", "A sentence.", { status: "done", detail: "x" }),
    ).json();
    expect(body).toMatchObject({ status: 409, detail: "A sentence." });
  });

  it("tells a throttled reader when to come back", () => {
    const response = problem(new AppError("too many", "Wait 40 seconds.", { retryAfter: 40 }));
    expect(response.headers.get("retry-after")).toBe("40");
  });

  it("hides an unexpected error behind a reference that the log has too", async () => {
    const log = vi.spyOn(console, "error").mockImplementation(() => undefined);
    const response = problem(new Error("relation secret_table does not exist"));
    const text = await response.text();
    expect(response.status).toBe(500);
    expect(text).not.toContain("secret_table");
    expect(String(log.mock.calls[0]?.[0])).toContain(JSON.parse(text).reference);
  });

  // Codes from the appendix "PostgreSQL Error Codes" of its manual (57P01 admin_shutdown), and errno names of POSIX.
  it.each(["57P01", "57P03", "08006", "ECONNREFUSED"])(
    "says 'unavailable' when the cause is the database being away (%s)",
    (code) => {
      vi.spyOn(console, "warn").mockImplementation(() => undefined);
      const cause = Object.assign(new Error("x"), { code });
      expect(problem(new Error("Failed query", { cause })).status).toBe(503);
    },
  );
});
