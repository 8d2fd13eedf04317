/** A repeatable stream of numbers in [0, 1) (Lehmer's generator of 1951 with the multiplier 48271). */
export function stream(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

export interface Network {
  readonly resistors: readonly { readonly from: string; readonly to: string; readonly ohms: number }[];
  readonly transistors: readonly {
    readonly kind: "npn" | "pnp";
    readonly c: string;
    readonly b: string;
    readonly e: string;
  }[];
}

/** A random network on 10 V: resistors everywhere, one in series with every base and emitter, so that a solution exists. */
export function network(next: () => number): Network {
  const inner = Array.from({ length: 3 + Math.floor(6 * next()) }, (_, i) => `n${i}`);
  const all = [...inner, "ground", "vcc"];
  const pick = () => all[Math.floor(all.length * next())]!;
  const other = (than: string) => {
    let one = pick();
    while (one === than) one = pick();
    return one;
  };
  const ohms = (low: number, decades: number) => Number((10 ** (low + decades * next())).toPrecision(3));
  const resistors = inner.flatMap((from) => [
    { from, to: other(from), ohms: ohms(2, 4) },
    { from, to: "ground", ohms: ohms(4, 4) },
  ]);
  const transistors = Array.from({ length: 2 + Math.floor(8 * next()) }, (_, i) => {
    const c = pick();
    resistors.push({ from: `b${i}`, to: other(c), ohms: ohms(2, 3) });
    resistors.push({ from: `e${i}`, to: other(c), ohms: ohms(1, 3) });
    return { kind: next() < 0.5 ? ("npn" as const) : ("pnp" as const), c, b: `b${i}`, e: `e${i}` };
  });
  return { resistors, transistors };
}

/** The network of a seed that comes after `index` others. */
export function networkAt(seed: number, index: number): Network {
  const next = stream(seed);
  for (let k = 0; k < index; k++) network(next);
  return network(next);
}

export function textOfNetwork({ resistors, transistors }: Network): string {
  return [
    "model Mnpn : npn { Is = 1 fA, beta_f = 100, beta_r = 2, Va_f = 60 V }",
    "model Mpnp : pnp { Is = 1 fA, beta_f = 100, beta_r = 2, Va_f = 60 V }",
    "ground -- V1 : voltage 10 V -- vcc",
    ...resistors.map(({ from, to, ohms }, i) => `${from} -- R${i} : resistor ${ohms} Ω -- ${to}`),
    ...transistors.map(({ kind, c, b, e }, i) => `Q${i} : M${kind} { c = ${c}, b = ${b}, e = ${e} }`),
    "show vcc.v",
  ].join("\n");
}
