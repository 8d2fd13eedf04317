interface Named {
  readonly title: string;
  readonly netlistNumber: number;
  readonly number: number;
}

/** Letters of a title that go into a name. */
const MOST = 48;

/** "ratio-head-netlist-4-run-12.csv": plain letters, so that every system takes it; without the title where it has none. */
export function fileName({ title, netlistNumber, number }: Named, extension: string): string {
  const plain = title
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .slice(0, MOST)
    .replace(/^-|-$/g, "");
  return `${plain === "" ? "" : `${plain}-`}netlist-${netlistNumber}-run-${number}.${extension}`;
}
