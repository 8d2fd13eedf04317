import { describe, expect, it } from "vitest";
import { localPath } from "@/app/(auth)/sign-in/local-path";

describe("where a sign-in may lead", () => {
  it.each(["/north-bench", "/north-bench/runs?query=a//b&page=2", "/a/../b", "/%2f/x", "/x#//y"])(
    "%s is a path of ours",
    (path) => {
      expect(localPath(path)).toBe(path);
    },
  );

  it.each([
    "//evil.example",
    "/\\evil.example",
    "/.//evil.example",
    "/..//evil.example",
    "/x/..//evil.example",
    "/%2e//evil.example",
    "/a/%2E%2e//evil.example",
    "https://evil.example",
    "javascript:alert(1)",
    "/\t/evil.example",
    "/sign-in?next=/x",
    "/x/../sign-in",
    "",
    undefined,
    ["/a", "/b"],
  ])("%j is none", (value) => {
    expect(localPath(value)).toBeNull();
  });
});
