"use client";

import type { Ruler } from "./axes";
import { AxisSwitch } from "./axis-switch";
import type { CurveSet } from "./curve-set";
import type { CurveView } from "./curve-view";
import type { StoreyView } from "./storey-views";
import { shownWorst, worstDraws } from "./worst-draw";

interface Props {
  readonly set: CurveSet;
  readonly plot: { readonly horizontal: Ruler; readonly storeys: readonly StoreyView[] };
  readonly view: CurveView;
  readonly onView: (change: Partial<CurveView>) => void;
}

/** How the axes run, and what is drawn of the draws. */
export function FigureControls({ set, plot, view, onView }: Props) {
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-2" data-print="never">
      <AxisSwitch
        name={set.axis.knob}
        scale={plot.horizontal.mapping.scale}
        fit={plot.horizontal.fit}
        onChange={(x) => onView({ x })}
      />
      {plot.storeys.map(({ key, traces, axis }) => (
        <AxisSwitch
          key={key}
          name={traces.length === 1 ? traces[0]! : key}
          scale={axis.mapping.scale}
          fit={axis.fit}
          onChange={(scale) => onView({ y: { ...view.y, [key]: scale } })}
        />
      ))}
      {set.draws > 0 && <DrawsControl set={set} view={view} onView={onView} />}
    </div>
  );
}

/** Whether the draws are shown as a band, and whose worst draw is drawn. Lines are those of the nominal design. */
function DrawsControl({ set, view, onView }: Omit<Props, "plot">) {
  const worst = worstDraws(set);
  const shown = shownWorst(set, view);
  return (
    <div className="flex min-w-0 flex-wrap items-center gap-x-3 gap-y-2 text-xs">
      <label className="inline-flex min-h-6 cursor-pointer items-center gap-2">
        <input
          type="checkbox"
          checked={view.band !== false}
          onChange={({ target }) => onView({ band: target.checked })}
          className="size-3.5 accent-accent"
        />
        band: 5 to 95{"\u202f"}% of the draws
      </label>
      {worst.length > 0 && (
        <label className="flex min-w-0 flex-wrap items-center gap-x-2 gap-y-1">
          <span className="text-quiet">fine dots: worst draw of</span>
          <select
            value={shown?.label ?? ""}
            onChange={({ target }) => onView({ worst: target.value })}
            className="min-h-6 min-w-0 max-w-full rounded-[2px] border border-edge bg-surface px-1.5 text-ink"
          >
            {worst.map(({ label, draw }, i) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: two may have one label; the order never changes
              <option key={i} value={label}>
                {label} (draw {draw})
              </option>
            ))}
            <option value="">none</option>
          </select>
        </label>
      )}
    </div>
  );
}
