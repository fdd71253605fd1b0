// Round numbers: where an axis has its ticks, and at which values contour lines are drawn.

/** Round values from `low` to `high`, in steps of 1, 2 or 5 times a power of ten: about `count` of them. */
export function roundValues({ low, high, count }: { low: number; high: number; count: number }): number[] {
  const rough = (high - low) / count;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = power * ([1, 2, 5].find((factor) => factor * power >= rough) ?? 10);
  // A limit that is itself a round value may miss its own step by a rounding error.
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, k) => withoutNoise((first + k) * step));
}

/** Ticks of a logarithmic axis, at most `most`: 1, 2, 5 of each decade if they fit, else fewer; round steps within a decade. */
export function logarithmicTicks(low: number, high: number, most = 7): number[] {
  const inRange = (value: number): boolean => value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9);
  const decades = powersOfTen(low, high);
  const candidates = [[1, 2, 5], [1, 3], [1]].map((factors) =>
    decades.flatMap((decade) => factors.map((factor) => withoutNoise(factor * decade))).filter(inRange),
  );
  const ticks = candidates.find((values) => values.length <= most);
  if (ticks === undefined) return everyFew(candidates.at(-1)!, most);
  return ticks.length < 3 ? roundValues({ low, high, count: most - 1 }) : ticks;
}

function powersOfTen(low: number, high: number): number[] {
  const first = Math.floor(Math.log10(low));
  const count = Math.ceil(Math.log10(high)) - first + 1;
  return Array.from({ length: count }, (_, k) => Number(`1e${first + k}`));
}

function everyFew(values: readonly number[], most: number): number[] {
  const stride = Math.ceil(values.length / most);
  return values.filter((_, i) => i % stride === 0);
}

function withoutNoise(value: number): number {
  return Number(value.toPrecision(12));
}
