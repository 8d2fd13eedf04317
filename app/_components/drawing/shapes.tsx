import { classNames } from "@/app/_components/ui/class-names";
import type { Chip, Frame, Rail, Wire } from "./layout";
import { FRAME_HEAD, OPENER, saidOf } from "./measures";

/** Letters that lines may run behind. */
const HALO = "stroke-surface [paint-order:stroke] [stroke-linejoin:round] [stroke-width:4px]";

const OWN = (name: string) => name.slice(name.lastIndexOf(".") + 1);

interface Choosable {
  /** The reader has chosen it. */
  readonly isChosen: boolean;
}

/** The border of a place on the drawing. */
function Border({
  place: { x, y, width, height },
  ...look
}: {
  readonly place: Pick<Frame, "x" | "y" | "width" | "height">;
  readonly className: string;
  readonly strokeWidth: number;
  readonly strokeDasharray?: string;
}) {
  return <rect x={x} y={y} width={width} height={height} rx={2} {...look} />;
}

/** A box: its name, what it is, and the names of its pins at its edges. A block that can be opened has a second border. */
export function ChipShape({ chip, isChosen }: Choosable & { readonly chip: Chip }) {
  const { box, x, y, width, height, leftPins, rightPins } = chip;
  const middle = x + leftPins + (width - leftPins - rightPins - (box.inside === null ? 0 : OPENER)) / 2;
  return (
    <g>
      <Border
        place={chip}
        className={isChosen ? "fill-wash stroke-accent" : "fill-surface stroke-edge"}
        strokeWidth={isChosen ? 2.5 : 1}
      />
      {box.inside !== null && (
        <rect
          x={x + 3}
          y={y + 3}
          width={width - 6}
          height={height - 6}
          rx={1}
          className="fill-none stroke-rule"
        />
      )}
      <text
        x={middle}
        y={y + height / 2 - 3}
        textAnchor="middle"
        className="fill-ink font-semibold text-[13px]"
      >
        {OWN(box.name)}
      </text>
      <text x={middle} y={y + height / 2 + 12} textAnchor="middle" className="fill-quiet text-[11.5px]">
        {saidOf(box)}
      </text>
    </g>
  );
}

/**
 * Lines from pins to their rails, with a dot where they are joined; a thick upright piece of the ground rail, or a ring where a pin
 * is open. Each sort is one path, since a large drawing has thousands.
 */
export function WiresShape({ wires, isChosen }: Choosable & { readonly wires: readonly Wire[] }) {
  const line = isChosen ? "stroke-accent" : "stroke-ink";
  const fill = isChosen ? "fill-accent" : "fill-ink";
  const grounded = wires.filter(({ net }) => net === "ground");
  const open = wires.filter(({ net }) => net === null);
  const joined = wires.filter(({ net }) => net !== null && net !== "ground");
  const dots = joined.map(({ to, y }) => ring(to, y, isChosen ? 4 : 3));
  return (
    <g>
      <path
        d={wires.map(({ x, to, y }) => `M${x} ${y}H${to}`).join("")}
        className={line}
        strokeWidth={isChosen ? 2.25 : 1.1}
      />
      <path d={grounded.map(({ to, y }) => `M${to - 2} ${y - 7}h4v14h-4z`).join("")} className={fill} />
      <path d={dots.join("")} className={fill} />
      <path
        d={open.map(({ to, y }) => ring(to, y, 4)).join("")}
        className="fill-surface stroke-broken"
        strokeWidth={1.5}
      />
    </g>
  );
}

function ring(x: number, y: number, r: number): string {
  return `M${x - r} ${y}a${r} ${r} 0 1 0 ${2 * r} 0a${r} ${r} 0 1 0 ${-2 * r} 0z`;
}

/** The name of a pin inside the edge of its chip. */
export function PinName({ wire: { pin, side, x, y } }: { readonly wire: Wire }) {
  return (
    <text
      x={side === "left" ? x + 6 : x - 6}
      y={y + 3.5}
      textAnchor={side === "left" ? "start" : "end"}
      className="fill-quiet text-[11.5px]"
    >
      {pin}
    </text>
  );
}

/** The line of a net, under its name. */
export function RailShape({ rail: { net, x, top, bottom }, isChosen }: Choosable & { readonly rail: Rail }) {
  return (
    <g>
      <line
        x1={x}
        y1={top}
        x2={x}
        y2={bottom}
        className={isChosen ? "stroke-accent" : "stroke-ink"}
        strokeWidth={isChosen ? 3 : 1.6}
      />
      <text
        x={x}
        y={top - 7}
        textAnchor="middle"
        className={classNames("text-[12px]", HALO, isChosen ? "fill-accent font-semibold" : "fill-ink")}
      >
        {OWN(net)}
      </text>
    </g>
  );
}

/** The border round what stands inside an open block, with its name. */
export function FrameShape({ frame, isChosen }: Choosable & { readonly frame: Frame }) {
  const { box, x, y } = frame;
  return (
    <g>
      <Border
        place={frame}
        className={classNames("fill-none", isChosen ? "stroke-accent" : "stroke-edge")}
        strokeWidth={isChosen ? 2 : 1}
        strokeDasharray="5 3"
      />
      <text x={x + 24} y={y + FRAME_HEAD / 2 + 4} className={classNames("fill-ink text-[12px]", HALO)}>
        <tspan className="font-semibold">{OWN(box.name)}</tspan>
        <tspan className="fill-quiet"> {box.of}</tspan>
      </text>
    </g>
  );
}

/** What is pressed to open or close a block: a plus or a minus in a square. */
export function OpenerShape({
  x,
  y,
  isOpen,
}: {
  readonly x: number;
  readonly y: number;
  readonly isOpen: boolean;
}) {
  return (
    <g>
      <rect x={x - 12} y={y - 12} width={24} height={24} className="fill-transparent" />
      <rect x={x - 7} y={y - 7} width={14} height={14} rx={2} className="fill-surface stroke-edge" />
      <path
        d={`M ${x - 4} ${y} H ${x + 4}${isOpen ? "" : ` M ${x} ${y - 4} V ${y + 4}`}`}
        className="stroke-ink"
        strokeWidth={1.5}
      />
    </g>
  );
}
