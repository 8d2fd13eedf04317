"use client";

import type { CurveSet } from "@/app/_components/curves/curve-set";
import { type CurveView, drawnChoice } from "@/app/_components/curves/curve-view";
import { figurePng, figureSvg } from "@/app/_components/curves/export-figure";
import { figureBands } from "@/app/_components/curves/figure-bands";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import { Button } from "@/app/_components/ui/button";
import { Menu, MenuItem, MenuLabel, MenuSeparator } from "@/app/_components/ui/menu";
import type { AllowedBand } from "@/lib/analyses/allowed-bands";
import { columnsPath } from "./fetch-run";
import { fileName } from "./file-name";
import type { RunState } from "./run-shapes";
import { saveBlob, saveFrom } from "./save-file";
import { sourceLine } from "./source-line";

/** The plot as it is seen. */
export interface SeenFigure {
  readonly set: CurveSet;
  readonly view: CurveView;
  readonly allowed: readonly AllowedBand[];
}

interface Props {
  readonly workspace: string;
  readonly run: RunState;
  /** Null while there are no curves. */
  readonly figure: SeenFigure | null;
  /** Runs a deed that may fail, and tells of it. */
  readonly attempt: (deed: () => Promise<void>) => () => Promise<void>;
}

const THEMES = ["light", "dark"] as const;

/** Ways to take the results of a run along: its numbers in three forms, its plot as it is seen in two. */
export function ExportMenu({ workspace, run, figure, attempt }: Props) {
  const numbers = [
    { words: "Points as CSV", from: `/${workspace}/runs/${run.id}/points.csv`, extension: "csv" },
    { words: "Run document as JSON", from: `/api/v1/runs/${run.id}`, extension: "json" },
    { words: "Columns as binary numbers", from: columnsPath(run.id), extension: "columns" },
  ];
  const request = (theme: (typeof THEMES)[number]) => ({
    ...figure!,
    theme,
    title: run.title,
    source: sourceLine(run),
    bands:
      figure!.view.band === false
        ? new Map()
        : figureBands(figure!.set, drawnChoice(figure!.set, figure!.view).traces),
  });
  const files = numbers.map(({ words, from, extension }) => ({
    words,
    save: () => saveFrom(from, fileName(run, extension)),
  }));
  const drawings = THEMES.map((theme) => ({
    words: `Drawing as SVG, ${theme}`,
    save: attempt(async () => {
      const type = "image/svg+xml;charset=utf-8";
      saveBlob(new Blob([figureSvg(request(theme))], { type }), fileName(run, "svg"));
    }),
  }));
  const pictures = THEMES.map((theme) => ({
    words: `Picture as PNG, ${theme}`,
    save: attempt(async () => saveBlob(await figurePng(request(theme)), fileName(run, "png"))),
  }));
  const plots = figure === null ? [] : [...drawings, ...pictures];
  useDeeds(
    "here",
    [...files, ...plots].map(({ words, save }) => ({
      id: `export ${words}`,
      words: `Export ${words.charAt(0).toLowerCase()}${words.slice(1)}`,
      also: "download save file numbers plot",
      does: () => void save(),
    })),
    2,
  );
  return (
    <Menu trigger={<Button>Export</Button>}>
      <MenuLabel>Numbers</MenuLabel>
      {files.map(({ words, save }) => (
        <MenuItem key={words} onSelect={save}>
          {words}
        </MenuItem>
      ))}
      {plots.length > 0 && (
        <>
          <MenuSeparator />
          <MenuLabel>The plot as it is seen</MenuLabel>
          {plots.map(({ words, save }) => (
            <MenuItem key={words} onSelect={save}>
              {words}
            </MenuItem>
          ))}
        </>
      )}
    </Menu>
  );
}
