/** A page of the reference: its address, its name in the navigation, and what one finds there. */
export interface DocsEntry {
  readonly href: string;
  readonly label: string;
  readonly about: string;
}

/** Every page of the reference, in the order in which one reads them. */
export const DOCS_GROUPS: readonly { readonly title: string; readonly pages: readonly DocsEntry[] }[] = [
  {
    title: "Start",
    pages: [
      {
        href: "/docs/tour",
        label: "First tour",
        about: "Five minutes and seven steps, done on a live sheet that sees what you do.",
      },
      {
        href: "/docs/examples",
        label: "Examples",
        about: "Whole circuits of the trade, each live: change a value and the curve moves.",
      },
    ],
  },
  {
    title: "Reference",
    pages: [
      {
        href: "/docs/language",
        label: "Language",
        about: "Every statement, kind, unit, signal and function of a netlist.",
      },
      {
        href: "/docs/models",
        label: "Models",
        about: "The equations of each part, its parameters and where they come from.",
      },
      {
        href: "/docs/readings",
        label: "Readings",
        about: "How a trace becomes a number, and how a requirement is judged.",
      },
      {
        href: "/docs/diagnostics",
        label: "Diagnostics",
        about: "Every code that a netlist can be answered with, an example and its fix.",
      },
    ],
  },
  {
    title: "Automation",
    pages: [
      {
        href: "/docs/pipeline",
        label: "Command line",
        about: "Check and run netlists in a pipeline: options, reports, exit codes.",
      },
      {
        href: "/docs/api",
        label: "API",
        about: "Netlists, revisions, runs and their figures over HTTP.",
      },
    ],
  },
];
