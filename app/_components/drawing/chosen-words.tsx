import type { Connections } from "@/lib/language/symbols/connections";
import { allBoxes, netsWithPins } from "./chosen";
import { NameButton } from "./connection-list";

/** Names told of at most. */
const MOST_TOLD = 3;

interface Props {
  readonly connections: Connections;
  readonly chosen: readonly string[];
  readonly onChoose: (name: string) => void;
}

/** What is chosen, in words, each name of which can be chosen in its turn. */
export function ChosenWords({ connections, chosen, onChoose }: Props) {
  const boxes = allBoxes(connections.rows);
  const pins = netsWithPins(connections);
  const told = chosen.filter((name) => pins.has(name) || boxes.some((box) => box.name === name));
  const button = (name: string, label = name) => (
    <NameButton key={label} name={name} label={label} isChosen={false} onChoose={onChoose} />
  );
  return (
    <div
      aria-live="polite"
      className="max-h-28 shrink-0 overflow-y-auto border-t bg-paper px-3 py-1.5 text-sm"
    >
      {told.length === 0 && (
        <p className="min-h-7 text-quiet">
          Choose an element or a net to see where the text says it; what the cursor stands on is marked here.
        </p>
      )}
      {told.slice(0, MOST_TOLD).map((name) => {
        const box = boxes.find((one) => one.name === name);
        return (
          <p key={name} className="flex min-h-7 flex-wrap items-center gap-x-1">
            <span className="figures font-semibold">{name}</span>
            {box === undefined ? (
              <>
                <span className="text-quiet">net:</span>
                {pins.get(name)!.map((pin) => button(pin.slice(0, pin.lastIndexOf(".")), pin))}
              </>
            ) : (
              <>
                <span className="text-quiet">{box.value === "" ? box.of : `${box.of} ${box.value}`}:</span>
                {box.joints.map(({ pin, net }) => (
                  <span key={pin} className="inline-flex items-center">
                    <span className="text-quiet">{pin}</span>
                    {net === null ? <span className="ml-1 text-broken">open</span> : button(net)}
                  </span>
                ))}
              </>
            )}
          </p>
        );
      })}
      {told.length > MOST_TOLD && <p className="text-quiet">and {told.length - MOST_TOLD} more</p>}
    </div>
  );
}
