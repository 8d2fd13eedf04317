import { insideOf } from "./declare";
import type { NamedSymbol, NameScope } from "./symbol";

/** Names given at most; a block may have hundreds of instances. */
const MOST_PATHS = 8;

/**
 * The names that a symbol of the circuit has once blocks are taken apart: its own in the file, `S.x` and `T.x` inside a block with
 * two instances; for a net of a block's head those of the nets it is joined to.
 */
export function pathsOf(symbol: NamedSymbol, file: NameScope): string[] {
  const { name, meaning, scope } = symbol;
  if (scope === file || name === "ground" || name === "temperature") return [name];
  const paths = instancesOf(scope, file, 0).flatMap(({ prefix, instance }) => {
    if (meaning !== "port") return [`${prefix}${instance.name}.${name}`];
    const outside = joined(instance, name);
    return outside === null ? [] : [outside === "ground" ? outside : prefix + outside];
  });
  return [...new Set(paths)].slice(0, MOST_PATHS);
}

interface Instance {
  readonly prefix: string;
  readonly instance: NamedSymbol;
}

/** Every instance of the block whose inside is `scope`, with what stands before its name. */
function instancesOf(scope: NameScope, file: NameScope, depth: number): Instance[] {
  const found: Instance[] = [];
  for (const around of file.all()) {
    for (const instance of around.names.values()) {
      if (found.length >= MOST_PATHS) return found;
      const block = instance.meaning === "instance" ? around.find(instance.of ?? "") : null;
      if (block === null || insideOf(block) !== scope) continue;
      if (around === file) found.push({ prefix: "", instance });
      // A block that contains itself has no end.
      else if (depth < MOST_PATHS)
        for (const outer of instancesOf(around, file, depth + 1))
          found.push({ prefix: `${outer.prefix}${outer.instance.name}.`, instance });
    }
  }
  return found;
}

function joined({ statement }: NamedSymbol, port: string): string | null {
  if (statement?.kind !== "device") return null;
  const value = statement.settings.find(({ name }) => name.text === port)?.value;
  return value?.kind === "name" && value.path.length === 1 ? value.path[0]!.text : null;
}
