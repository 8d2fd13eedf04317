import { describe, expect, it } from "vitest";
import { readListState as netlistsState } from "@/app/(work)/[workspace]/netlists/(table)/list-state";
import { readListState as runsState } from "@/app/(work)/[workspace]/runs/(list)/list-state";
import { listInput as netlistsInput } from "@/lib/services/netlists/schemas";
import { listInput as runsInput } from "@/lib/services/runs/schemas";

/** Addresses that nobody's link has. */
const ODD = [
  "query=%00",
  "query=a%00b",
  `query=${encodeURIComponent(`${"x".repeat(199)}😀`)}`,
  `query=${"y".repeat(9_999)}`,
  "page=1e300&sort=__proto__&direction=up&status=constructor",
  "page=-1",
  "page=0.5",
];

describe("the state an address names", () => {
  it.each(ODD)("is one that the services take: %j", (address) => {
    const search = new URLSearchParams(address);
    expect(netlistsInput.safeParse(netlistsState(search)).error).toBeUndefined();
    const { status, ...rest } = runsState(search);
    expect(runsInput.safeParse({ ...rest, status: status ?? undefined }).error).toBeUndefined();
  });

  it("keeps what can be searched for", () => {
    expect(netlistsState(new URLSearchParams("query=a%00b 😀")).query).toBe("ab 😀");
    expect(runsState(new URLSearchParams("query=5 %25_")).query).toBe("5 %_");
  });
});
