import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { figureSvg } from "@/app/_components/curves/export-figure";
import { THEMES } from "@/app/_components/curves/theme-values";
import { madeUpSource } from "./multiplier";

const plain = (text: string) => text.replaceAll("\u202f", " ");
const x = Array.from({ length: 41 }, (_, i) => Number((1e-3 * 10 ** (i / 20)).toPrecision(12)));

function svgOf(source: CurveSource, more: object = {}): string {
  return figureSvg({
    set: curveSet(source)!,
    view: USUAL_VIEW,
    theme: "light",
    title: "Multiplier <first>",
    source: "netlist 3, revision 2",
    ...more,
  });
}

const source = madeUpSource(x, [283.15, 298.15]);

describe("a figure as SVG", () => {
  const svg = plain(svgOf(source));

  it("carries its title, a description, the names of traces, lines and axis, and where it comes from", () => {
    expect(svg).toContain('<title id="figure-title">Multiplier &lt;first&gt;</title>');
    expect(svg).toMatch(
      /<desc[^>]*>Over V_x from 1 mV to 100 mV, at 2 settings of temperature: product rises/,
    );
    for (const words of [">product  V<", ">ratio<", ">25 °C<", ">V_x<", ">10 mV<", "netlist 3, revision 2"]) {
      expect(svg).toContain(words);
    }
  });

  it("draws each line once, in its colour and dashes, inside its storey", () => {
    const lines = svg.match(/<path[^>]*stroke-width="1.75"[^>]*>/g)!;
    expect(lines).toHaveLength(4);
    expect(lines.every((line) => /clip-path="url\(#figure-part-\d\)"/.test(line))).toBe(true);
    expect(new Set(lines.map((line) => / stroke="(#\w+)"/.exec(line)![1])).size).toBe(2);
  });

  it("is well-formed: every mark is closed, and no number is missing", () => {
    expect(svg).not.toMatch(/NaN|undefined|Infinity/);
    expect(svg.match(/<text /g)!.length).toBe(svg.match(/<\/text>/g)!.length);
  });

  it("shades what is allowed and says so", () => {
    const allowed = [{ label: "range", trace: "ratio", from: 1e-3, to: 1e-2, low: 0, high: 1e-4, at: [] }];
    const shaded = svgOf(source, { allowed });
    expect(shaded).toContain("shaded: allowed");
    expect(shaded).toContain(THEMES.light["--holds"]);
    expect(svg).not.toContain(THEMES.light["--holds"]);
  });

  it("marks failed places, and is drawn in the colours of the theme asked for", () => {
    const failing = svgOf(madeUpSource([-2, -1, 1, 2], [300]), { theme: "dark" });
    expect(failing).toContain(">failed<");
    expect(failing).toContain(`fill="${THEMES.dark["--paper"]}"`);
  });
});

describe("the themes of files", () => {
  it("are those of the pages", () => {
    const css = readFileSync("app/globals.css", "utf8");
    const blocks = {
      light: css.slice(css.indexOf(":root {"), css.indexOf("@media screen and (prefers-color-scheme: dark)")),
      dark: css.slice(css.indexOf(':root[data-theme="dark"] {')),
    };
    for (const theme of ["light", "dark"] as const) {
      for (const [token, value] of Object.entries(THEMES[theme])) {
        expect(new RegExp(`${token}: (#\\w+);`).exec(blocks[theme])?.[1], `${theme} ${token}`).toBe(value);
      }
    }
  });
});
