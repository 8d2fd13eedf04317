import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { answered } from "@/app/docs/diagnostics/answered";
import DiagnosticsPage from "@/app/docs/diagnostics/page";
import { CATALOGUE, type Code } from "@/lib/language/catalogue";

const CODES = Object.keys(CATALOGUE) as Code[];

describe("the page of the diagnostics", () => {
  test("has every code of the catalogue with its title, once, and no other", () => {
    const page = renderToStaticMarkup(<DiagnosticsPage />);
    const ids = [...page.matchAll(/<h3 id="([^"]*)"/g)].map(([, id]) => id);
    expect([...ids].sort()).toEqual([...CODES].sort());
    expect(CODES.filter((code) => !page.includes(CATALOGUE[code].replace("'", "&#x27;")))).toEqual([]);
  });

  test.each(CODES)("shows what the checker says of a text with %s", (code) => {
    const { message, line, fix } = answered(code);
    expect(message).toMatch(/[.?]$/);
    expect(line.join("").length).toBeLessThan(200);
    if (fix !== null) expect(fix.line).not.toBe(line.join(""));
  });

  test("shows fixes where the checker has them", () => {
    const mended = CODES.filter((code) => answered(code).fix !== null);
    expect(mended).toEqual(expect.arrayContaining(["TXT1", "NAM3", "UNI2", "CON1", "WIR10"]));
    expect(answered("UNI2").fix!.line).toBe("ground -- R2 : resistor 10 kΩ -- in");
  });
});
