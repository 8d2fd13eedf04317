import { classNames } from "@/app/_components/ui/class-names";
import { StateMark } from "@/app/_components/ui/state-mark";
import type { Progress } from "./progress";
import { STEPS, type StepName } from "./steps";

interface Props {
  readonly progress: Progress;
  readonly onChoose: (name: StepName) => void;
}

/** The steps in a row, each with its state; any of them may be opened. */
export function StepRow({ progress, onChoose }: Props) {
  return (
    <nav aria-label="Steps of the tour">
      <ol className="flex flex-wrap gap-1">
        {STEPS.map(({ name, word }, index) => {
          const isDone = progress.done[name] !== undefined;
          const isHere = progress.at === name;
          return (
            <li key={name}>
              <button
                type="button"
                aria-current={isHere ? "step" : undefined}
                onClick={() => onChoose(name)}
                className={classNames(
                  "flex min-h-8 min-w-8 items-center justify-center gap-1.5 rounded-[2px] border px-2 text-sm",
                  isHere
                    ? "border-ink font-semibold"
                    : "border-transparent text-quiet hover:border-edge hover:text-ink",
                )}
              >
                <span className="figures">{index + 1}</span>
                <span className="sr-only sm:not-sr-only">{word}</span>
                {isDone && (
                  <span className="text-holds">
                    <StateMark shape="check" />
                    <span className="sr-only">done</span>
                  </span>
                )}
              </button>
            </li>
          );
        })}
      </ol>
    </nav>
  );
}
