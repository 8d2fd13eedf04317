import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import PipelinePage from "@/app/docs/pipeline/page";
import { RECIPES, REPORTS } from "@/app/docs/pipeline/recipes";
import { compile } from "@/lib/analyses/compile";
import { annotation } from "@/lib/cli/annotations";
import { CODES, COMMANDS } from "@/lib/cli/commands";
import { EXIT } from "@/lib/cli/exit-codes";
import { readOptions } from "@/lib/cli/options";
import { lineStarts, placeOf } from "@/lib/language/span";

const page = renderToStaticMarkup(<PipelinePage />);

describe("the page of the command line", () => {
  test("has every command, option and exit code", () => {
    expect(CODES.map(([code]) => code).sort()).toEqual(Object.values(EXIT).sort());
    const wanted = [
      ...COMMANDS.flatMap(({ name, options }) => [
        `command.${name}`,
        ...options.map((option) => `option.${name}.${option.name}`),
      ]),
      ...CODES.map(([code]) => `code.${code}`),
    ];
    expect(wanted.filter((id) => !page.includes(` id="${id}"`))).toEqual([]);
  });

  test("shows commands that are understood", () => {
    const lines = RECIPES.flatMap((recipe) => recipe.lines.split("\n"));
    const calls = lines.flatMap((line) => {
      const found = /npx sweepwright (\w+) ([^|]*?)(?: \|\| code=\$\?)?$/.exec(line);
      return found === null ? [] : [{ name: found[1]!, words: found[2]!.split(" ") }];
    });
    expect(calls.length).toBeGreaterThan(5);
    for (const { name, words } of calls) {
      const command = COMMANDS.find((one) => one.name === name)!;
      expect(readOptions(words, command).files).toEqual(["netlists/*.swn"]);
    }
  });

  test("shows an annotation as the program writes it", () => {
    const text = [
      'title "Head"',
      "ground -- V1 : voltage 1 V -- in -- R1 : resistor 1 kΩ -- ground",
      "show in.v",
      "ground -- R2 : resistor 10k -- in",
    ].join("\n");
    const [first] = compile(text).diagnostics;
    const { code, severity, message, from } = first!;
    const line = annotation({
      file: "head.swn",
      ...placeOf(lineStarts(text), from),
      severity,
      code,
      message,
    });
    expect(`${REPORTS[0]!.lines}\n`).toBe(line);
  });
});
