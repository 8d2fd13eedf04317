import { type CurveView, USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { type PageState, readPageState, writePageState } from "../../runs/[id]/page-state";

/** What the address of a sheet keeps: what stands beside the text, how its curves are looked at, and what the knobs are turned to. */
export interface SheetAddress {
  readonly side: "preview" | "connections";
  readonly view: CurveView;
  /** SI values by knob: that of the first sweep is the cursor, that of an outer one the setting. */
  readonly turned: ReadonlyMap<string, number>;
}

/** What an address names; what makes no sense is left as it usually is. */
export function readSheetAddress(search: URLSearchParams): SheetAddress {
  const { traces, families, x, y, zoom, only } = readPageState(search);
  return {
    side: search.get("beside") === "connections" ? "connections" : "preview",
    view: { traces, families, x, y, zoom, only: only ?? null },
    turned: new Map(search.getAll("knob").flatMap(readKnob)),
  };
}

/** The address part, without what is usual; begins with "?" unless empty. */
export function writeSheetAddress({ side, view, turned }: SheetAddress): string {
  const search = new URLSearchParams(writePageState({ ...NOTHING_CHOSEN, ...view }));
  if (side !== "preview") search.set("beside", side);
  for (const [knob, value] of turned) search.append("knob", `${knob}:${value}`);
  const text = search.toString();
  return text === "" ? "" : `?${text}`;
}

const NOTHING_CHOSEN: PageState = {
  ...USUAL_VIEW,
  tab: "curves",
  point: null,
  page: 1,
  failed: false,
  subject: null,
  setting: null,
};

function readKnob(text: string): [string, number][] {
  const at = text.lastIndexOf(":");
  const value = Number(text.slice(at + 1));
  return at > 0 && text.slice(at + 1).trim() !== "" && Number.isFinite(value)
    ? [[text.slice(0, at), value]]
    : [];
}
