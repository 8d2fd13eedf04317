import { describe, expect, it } from "vitest";
import { hashPassword, passwordMatches } from "@/lib/auth/password";

describe("hashPassword", () => {
  // Parameters: the second choice of the OWASP Password Storage Cheat Sheet for Argon2id (m = 19 MiB, t = 2, p = 1), read in
  // the PHC string form that RFC 9106's reference program writes: $argon2id$v=19$m=KiB,t=passes,p=lanes$salt$tag.
  it("is Argon2id version 0x13 with 19456 KiB, two passes and one lane, a salt of 16 bytes and a tag of 32", async () => {
    const [, name, version, costs, salt, tag] = (await hashPassword("log-ratio-bench-7")).split("$");
    expect([name, version, costs]).toEqual(["argon2id", "v=19", "m=19456,t=2,p=1"]);
    expect(Buffer.from(salt ?? "", "base64")).toHaveLength(16);
    expect(Buffer.from(tag ?? "", "base64")).toHaveLength(32);
  });

  it("salts: the same password twice gives two strings, and both verify", async () => {
    const [one, other] = await Promise.all([hashPassword("a password"), hashPassword("a password")]);
    expect(one).not.toBe(other);
    expect(await passwordMatches(one, "a password")).toBe(true);
    expect(await passwordMatches(other, "a password")).toBe(true);
  });
});

describe("passwordMatches", () => {
  it("refuses another password, and any password where there is no account", async () => {
    expect(await passwordMatches(await hashPassword("right one"), "wrong one")).toBe(false);
    expect(await passwordMatches(null, "no account has this password")).toBe(false);
  });

  it("refuses a longer password that begins with the right one at its longest", async () => {
    const longest = "x".repeat(128);
    const stored = await hashPassword(longest);
    expect(await passwordMatches(stored, longest)).toBe(true);
    expect(await passwordMatches(stored, `${longest}x`)).toBe(false);
  });
});
