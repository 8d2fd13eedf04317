/** Points that one entry of the lowest layer stands for; each layer above stands for as many of the layer below. */
const BLOCK = 16;

/** Where the lowest and the highest value of a part of a column stand. */
export interface Ends {
  readonly low: number;
  readonly high: number;
}

/** One entry a block: the indices in the column of its lowest and highest value, −1 where the block has none. */
interface Layer {
  readonly low: Int32Array;
  readonly high: Int32Array;
}

const known = new WeakMap<Float64Array, readonly Layer[]>();

/**
 * Where a column is lowest and highest among its points [from, to); null where no value there is finite. The first question about
 * a column builds its layers in one pass, n/15 entries for n points; every further one looks at some 30 entries a layer, so that
 * a million points can be asked about once a pixel in every frame.
 */
export function endsIn(column: Float64Array, from = 0, to = column.length): Ends | null {
  if (to - from <= 4 * BLOCK) return scan(column, from, to);
  let layers = known.get(column);
  if (layers === undefined) {
    layers = layersOf(column);
    known.set(column, layers);
  }
  const found = { low: -1, high: -1 };
  climb(column, layers, 0, from, to, found);
  return found.low === -1 ? null : found;
}

function scan(column: Float64Array, from: number, to: number): Ends | null {
  const found = { low: -1, high: -1 };
  for (let i = from; i < to; i++) take(column, found, i, i);
  return found.low === -1 ? null : found;
}

/** Widens `found` by the values at two indices; NaN and infinite ones count for nothing. */
function take(column: Float64Array, found: { low: number; high: number }, low: number, high: number): void {
  const least = column[low]!;
  const most = column[high]!;
  if (least - least !== 0 || most - most !== 0) return;
  if (found.low === -1 || least < column[found.low]!) found.low = low;
  if (found.high === -1 || most > column[found.high]!) found.high = high;
}

/** Looks at entries [from, to) of a layer (0: the column itself), whole blocks of them through the layer above. */
function climb(
  column: Float64Array,
  layers: readonly Layer[],
  height: number,
  from: number,
  to: number,
  found: { low: number; high: number },
): void {
  const layer = height === 0 ? null : layers[height - 1]!;
  const look = (first: number, end: number) => {
    for (let i = first; i < end; i++) {
      if (layer === null) take(column, found, i, i);
      else if (layer.low[i]! !== -1) take(column, found, layer.low[i]!, layer.high[i]!);
    }
  };
  const first = Math.ceil(from / BLOCK);
  const last = Math.floor(to / BLOCK);
  if (height >= layers.length || first >= last) {
    look(from, to);
    return;
  }
  look(from, first * BLOCK);
  climb(column, layers, height + 1, first, last, found);
  look(last * BLOCK, to);
}

function layersOf(column: Float64Array): Layer[] {
  const layers: Layer[] = [];
  for (let below = column.length; below > BLOCK; below = layers.at(-1)!.low.length) {
    const count = Math.ceil(below / BLOCK);
    const layer = { low: new Int32Array(count).fill(-1), high: new Int32Array(count).fill(-1) };
    const under = layers.at(-1);
    const found = { low: -1, high: -1 };
    for (let block = 0; block < count; block++) {
      found.low = -1;
      found.high = -1;
      const end = Math.min(below, (block + 1) * BLOCK);
      for (let i = block * BLOCK; i < end; i++) {
        if (under === undefined) take(column, found, i, i);
        else if (under.low[i]! !== -1) take(column, found, under.low[i]!, under.high[i]!);
      }
      layer.low[block] = found.low;
      layer.high[block] = found.high;
    }
    layers.push(layer);
  }
  return layers;
}
