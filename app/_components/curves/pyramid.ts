/** Points that one entry of the lowest layer stands for; each layer above stands for as many of the layer below. */
const BLOCK = 16;
/** Fewer points than this are looked at one by one, which is then faster than to climb. */
const FEW = 256;

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
  if (to - from <= FEW) {
    const low = scan(column, from, to);
    return low === -1 ? null : { low, high: scanned };
  }
  let layers = known.get(column);
  if (layers === undefined) {
    layers = layersOf(column);
    known.set(column, layers);
  }
  const found = { low: -1, high: -1 };
  climb(column, layers, 0, from, to, found);
  return found.low === -1 ? null : found;
}

/** The index of the highest value that `scan` found, beside the lowest that it returns: two numbers without an object for them. */
let scanned = -1;

/** The index of the lowest of the values [from, to); −1 where none is finite. */
function scan(column: Float64Array, from: number, to: number): number {
  let low = -1;
  let high = -1;
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (let i = from; i < to; i++) {
    const value = column[i]!;
    if (value < least && value !== Number.NEGATIVE_INFINITY) {
      least = value;
      low = i;
    }
    if (value > most && value !== Number.POSITIVE_INFINITY) {
      most = value;
      high = i;
    }
  }
  scanned = high;
  return low;
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
  const lowest = layerOf(Math.ceil(column.length / BLOCK));
  for (let block = 0; block < lowest.low.length; block++) {
    lowest.low[block] = scan(column, block * BLOCK, Math.min(column.length, (block + 1) * BLOCK));
    lowest.high[block] = scanned;
  }
  const layers = [lowest];
  for (let under = lowest; under.low.length > BLOCK; under = layers.at(-1)!) {
    const below = under.low.length;
    const layer = layerOf(Math.ceil(below / BLOCK));
    const found = { low: -1, high: -1 };
    for (let block = 0; block < layer.low.length; block++) {
      found.low = -1;
      found.high = -1;
      const end = Math.min(below, (block + 1) * BLOCK);
      for (let i = block * BLOCK; i < end; i++) {
        if (under.low[i]! !== -1) take(column, found, under.low[i]!, under.high[i]!);
      }
      layer.low[block] = found.low;
      layer.high[block] = found.high;
    }
    layers.push(layer);
  }
  return layers;
}

function layerOf(count: number): Layer {
  return { low: new Int32Array(count).fill(-1), high: new Int32Array(count).fill(-1) };
}
