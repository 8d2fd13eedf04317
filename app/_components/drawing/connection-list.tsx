import type { Connections } from "@/lib/language/symbols/connections";
import { allBoxes, netsWithPins } from "./chosen";

interface Props {
  readonly connections: Connections;
  readonly chosen: readonly string[];
  readonly onChoose: (name: string) => void;
}

/** The drawing in words: each net with the pins that are joined to it, and the pins that are joined to nothing. */
export function ConnectionList({ connections, chosen, onChoose }: Props) {
  const nets = [...netsWithPins(connections)];
  const open = allBoxes(connections.rows).flatMap(({ name, joints, inside }) =>
    inside === null ? joints.filter(({ net }) => net === null).map(({ pin }) => `${name}.${pin}`) : [],
  );
  return (
    <section
      aria-label="Connections in words"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable from the keyboard
      tabIndex={0}
      className="h-full overflow-y-auto bg-surface px-3 py-1"
    >
      <dl className="text-sm">
        {nets.map(([net, pins]) => (
          <div key={net} className="grid grid-cols-[minmax(4rem,auto)_minmax(0,1fr)] gap-x-4 border-b py-1.5">
            <dt>
              <NameButton name={net} isChosen={chosen.includes(net)} onChoose={onChoose} />
            </dt>
            <dd className="flex flex-wrap gap-x-3">
              {pins.map((pin) => {
                const name = pin.slice(0, pin.lastIndexOf("."));
                return (
                  <NameButton
                    key={pin}
                    name={name}
                    label={pin}
                    isChosen={chosen.includes(name)}
                    onChoose={onChoose}
                  />
                );
              })}
              {pins.length === 0 && <span className="text-quiet">joined to nothing</span>}
            </dd>
          </div>
        ))}
      </dl>
      {open.length > 0 && <p className="py-2 text-broken text-sm">Open: {open.join(", ")}</p>}
    </section>
  );
}

/** A name that leads to its place in the text. */
export function NameButton({
  name,
  label = name,
  isChosen,
  onChoose,
}: {
  readonly name: string;
  readonly label?: string;
  readonly isChosen: boolean;
  readonly onChoose: (name: string) => void;
}) {
  return (
    <button
      type="button"
      aria-pressed={isChosen}
      onClick={() => onChoose(name)}
      className="figures min-h-7 rounded-[2px] px-1 text-left hover:underline aria-pressed:bg-wash aria-pressed:font-semibold aria-pressed:text-accent"
    >
      {label}
    </button>
  );
}
