import type { Draw } from "@/lib/circuit/values";
import type { Design, Tolerance } from "@/lib/language/ast";
import { type Counter, fraction, type Key, philox } from "./philox";

/**
 * Random draws of the tolerances of a design. A draw is keyed by the seed and the title, and counted by its number and the name of
 * what is drawn, so that any shard computes any draw, and a part added elsewhere leaves the draws of the others as they were.
 */
export class Draws {
  private readonly key: Key;
  /** Words of names met so far. */
  private readonly words = new Map<string, readonly [number, number]>();

  constructor({ title, draws }: Pick<Design, "title" | "draws">) {
    const seed = draws?.seed ?? 0;
    // A seed of more than 32 bits stirs both words.
    this.key = [seed >>> 0, (hash(title, 0) ^ Math.floor(seed / 0x1_0000_0000)) >>> 0];
  }

  /** Draw `number` of the random ones, which count from 1; draw 0 is nominal. */
  at(number: number): Draw | null {
    if (number === 0) return null;
    return {
      shift: (part, name, tolerance, nominal) => this.shift(number, `${part}/${name}`, tolerance, nominal),
    };
  }

  private shift(draw: number, name: string, tolerance: Tolerance, nominal: number): number {
    const { amount, relative, track } = tolerance;
    const whole = relative ? amount * nominal : amount;
    if (track === null) return whole * this.share(draw, name, tolerance);
    const own = track.relative ? track.within * nominal : track.within;
    const common = this.share(draw, `track ${track.group}`, tolerance);
    return whole * common + own * this.share(draw, name, tolerance);
  }

  /** The share of a half-width: −1 to 1 by a uniform law, by a normal one with a standard deviation of 1/sigmas. */
  private share(draw: number, name: string, { law, sigmas }: Tolerance): number {
    const [a, b, c, d] = philox(this.counterOf(draw, name), this.key);
    const u = fraction(a, b);
    if (law === "uniform") return 2 * u - 1;
    // Box and Muller, Annals of Mathematical Statistics 29 (1958) 610.
    return (Math.sqrt(-2 * Math.log(u)) * Math.cos(2 * Math.PI * fraction(c, d))) / sigmas;
  }

  private counterOf(draw: number, name: string): Counter {
    const known = this.words.get(name);
    const words = known ?? ([hash(name, 0), hash(name, 1)] as const);
    if (known === undefined) this.words.set(name, words);
    return [draw, words[0], words[1], 0];
  }
}

/** FNV-1a of 32 bits over the UTF-16 units of a text (Fowler, Noll and Vo, RFC 9923), begun anew for each `salt`. */
function hash(text: string, salt: number): number {
  let value = (0x811c9dc5 ^ Math.imul(salt, 0x9e3779b9)) >>> 0;
  for (let i = 0; i < text.length; i++) {
    const unit = text.charCodeAt(i);
    value = Math.imul(value ^ (unit & 0xff), 0x01000193);
    value = Math.imul(value ^ (unit >>> 8), 0x01000193);
  }
  return value >>> 0;
}
