/**
 * A root of a continuous function between two points where its signs differ: regula falsi with
 * Illinois weights, falling back to halving whenever a step fails to shorten the bracket enough.
 * An infinite value counts by its sign.
 */
export function findRoot(f: (x: number) => number, start: number, end: number): number {
  let [a, b] = [start, end];
  let [fa, fb] = [f(a), f(b)];
  if (fa === 0) return a;
  if (fb === 0) return b;
  for (let n = 0; n < 200; n++) {
    const width = Math.abs(b - a);
    const falsi = b - (fb * (b - a)) / (fb - fa);
    const inside = Number.isFinite(falsi) && (falsi - a) * (falsi - b) < 0;
    const x = inside && n % 4 !== 3 ? falsi : a + (b - a) / 2;
    const fx = f(x);
    if (fx === 0 || width <= 4e-16 * Math.max(Math.abs(a), Math.abs(b)) || x === a || x === b) return x;
    if (fx > 0 === fb > 0) {
      fa /= 2;
    } else {
      a = b;
      fa = fb;
    }
    b = x;
    fb = fx;
    if (Math.abs(fx) < 1e-14 && Math.abs(b - a) < 1e-13 * Math.max(1, Math.abs(b))) return b;
  }
  return b;
}

/**
 * Walks from `start` in growing steps until `f` changes sign and returns the bracket, or null where it
 * keeps its sign for as long as `limit` allows.
 */
export function bracketRoot(
  f: (x: number) => number,
  start: number,
  step: number,
  limit: number,
): [number, number] | null {
  const sign = f(start) > 0;
  let near = start;
  for (let stride = step; Math.abs(near - start) < limit; stride *= 1.6) {
    const far = near + stride;
    if (f(far) > 0 !== sign) return [near, far];
    near = far;
  }
  return null;
}

/**
 * The root between two points where the signs of `f` differ, by Newton steps that never leave the
 * shrinking bracket. `f` returns value and slope.
 */
export function newtonRoot(f: (x: number) => [number, number], bracket: [number, number]): number {
  let [low, high] = bracket;
  const lowIsPositive = f(low)[0] > 0;
  let x = low + (high - low) / 2;
  for (let n = 0; n < 200; n++) {
    const [value, slope] = f(x);
    if (value === 0) return x;
    if (value > 0 === lowIsPositive) low = x;
    else high = x;
    const step = x - value / slope;
    const next = (step - low) * (step - high) < 0 ? step : low + (high - low) / 2;
    if (Math.abs(next - x) <= 1e-15 * Math.max(1, Math.abs(x))) return next;
    x = next;
  }
  return x;
}
