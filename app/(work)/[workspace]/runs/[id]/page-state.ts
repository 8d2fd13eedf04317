import type { CurveView, Isolated } from "@/app/_components/curves/curve-view";
import type { Scale } from "@/app/_components/curves/scale";

/** What the address of a run's page keeps: how the curves are looked at, which tab is open, which point is chosen. */
export interface PageState extends CurveView {
  readonly tab: "curves" | "numbers";
  /** Flat number of the chosen point. */
  readonly point: number | null;
  /** Page of the table of numbers, counted from 1. */
  readonly page: number;
  /** Whether that table shows failed points only. */
  readonly failed: boolean;
  /** Whose spread is looked at (subjects.ts), and at which setting of the outer knobs; null for the usual ones. */
  readonly subject: string | null;
  readonly setting: number | null;
}

/** The state an address names; what is missing or makes no sense is left as it usually is. */
export function readPageState(search: URLSearchParams): PageState {
  const settings = search.get("settings");
  const families = settings?.split(".").map(Number).filter(isCount) ?? null;
  const zoom = { from: numberIn(search, "from"), to: numberIn(search, "to") };
  const point = numberIn(search, "point");
  const page = numberIn(search, "page");
  const setting = numberIn(search, "spread-at");
  return {
    traces: search.has("trace") ? search.getAll("trace").filter((name) => name !== "") : null,
    families: settings === "" ? [] : families,
    x: scaleOf(search.get("x")),
    y: Object.fromEntries(search.getAll("y").flatMap(readVertical)),
    zoom:
      zoom.from !== null && zoom.to !== null && zoom.from < zoom.to ? { from: zoom.from, to: zoom.to } : null,
    tab: search.get("tab") === "numbers" ? "numbers" : "curves",
    point: point !== null && isCount(point) ? point : null,
    page: page !== null && isCount(page) && page > 0 ? page : 1,
    failed: search.get("rows") === "failed",
    only: isolatedOf(search),
    band: search.get("band") !== "off",
    worst: search.get("worst"),
    subject: search.get("spread") || null,
    setting: setting !== null && isCount(setting) ? setting : null,
  };
}

/** The address part for a state, without what is usual; begins with "?" unless empty. */
export function writePageState(state: PageState): string {
  const search = new URLSearchParams();
  if (state.tab !== "curves") search.set("tab", state.tab);
  if (state.traces?.length === 0) search.set("trace", "");
  for (const name of state.traces ?? []) search.append("trace", name);
  if (state.families !== null) search.set("settings", state.families.join("."));
  if (state.x !== null) search.set("x", SHORT[state.x]);
  for (const [unit, scale] of Object.entries(state.y)) search.append("y", `${unit}:${SHORT[scale]}`);
  if (state.zoom !== null) {
    search.set("from", String(state.zoom.from));
    search.set("to", String(state.zoom.to));
  }
  if (state.point !== null) search.set("point", String(state.point));
  if (state.page !== 1) search.set("page", String(state.page));
  if (state.failed) search.set("rows", "failed");
  if (state.only != null) {
    if ("trace" in state.only) search.set("only", state.only.trace);
    else search.set("only-setting", String(state.only.family));
  }
  if (state.band === false) search.set("band", "off");
  if (state.worst != null) search.set("worst", state.worst);
  if (state.subject !== null) search.set("spread", state.subject);
  if (state.setting !== null) search.set("spread-at", String(state.setting));
  const text = search.toString();
  return text === "" ? "" : `?${text}`;
}

const SHORT = { linear: "linear", logarithmic: "log" } as const;

function isolatedOf(search: URLSearchParams): Isolated | null {
  const trace = search.get("only");
  if (trace) return { trace };
  const family = numberIn(search, "only-setting");
  return family !== null && isCount(family) ? { family } : null;
}

function scaleOf(text: string | null): Scale | null {
  return text === "log" ? "logarithmic" : text === "linear" ? "linear" : null;
}

function readVertical(text: string): [string, Scale][] {
  const at = text.lastIndexOf(":");
  const scale = scaleOf(text.slice(at + 1));
  return at > 0 && scale !== null ? [[text.slice(0, at), scale]] : [];
}

function numberIn(search: URLSearchParams, name: string): number | null {
  const text = search.get(name);
  if (text === null || text.trim() === "") return null;
  const value = Number(text);
  return Number.isFinite(value) ? value : null;
}

function isCount(value: number): boolean {
  return Number.isInteger(value) && value >= 0;
}
