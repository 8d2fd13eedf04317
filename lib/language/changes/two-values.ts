import { unitOf } from "@/lib/units/quantity";
import type { NamedValue } from "../ast";
import { sameMeaning } from "./same";
import { type Writing, writeTolerance } from "./written";

/** What writes the parts of the earlier design and of the later one. */
export interface Writers {
  readonly before: Writing;
  readonly after: Writing;
}

/** What is said of a change, part by part: at length and briefly. */
export interface Said {
  readonly says: string[];
  readonly brief: string[];
}

/** What became of a value; nothing where it means the same. */
export function twoValues(was: NamedValue, now: NamedValue, { before, after }: Writers): Said {
  const isSame = sameMeaning(was.value, now.value);
  if (isSame && sameMeaning(was.tolerance, now.tolerance)) return { says: [], brief: [] };
  const says = [`${before.value(was)} became ${after.value(now)}`];
  if (!isSame) {
    const [old, next] = [before.typed(was.value, was.name), after.typed(now.value, now.name)];
    return { says, brief: [`${next} instead of ${old}`] };
  }
  const around = ({ tolerance, value }: NamedValue) =>
    writeTolerance(tolerance, unitOf(value.dimension)) || "no tolerance";
  return { says, brief: [`${around(now)} instead of ${around(was)}`] };
}
