/** A whole number from 0 to 2³² − 1 that depends on nothing but its three arguments. */
function mixed(a: number, b: number, seed: number): number {
  let h = Math.imul(a, 0x27d4eb2d) ^ Math.imul(b, 0x165667b1) ^ Math.imul(seed, 0x9e3779b1);
  h = Math.imul(h ^ (h >>> 15), 0x2c1b3c6d);
  h = Math.imul(h ^ (h >>> 12), 0x297a2d39);
  return (h ^ (h >>> 15)) >>> 0;
}

/** A number from 0 to 1 for the n-th draw of a named series. */
export function drawn(n: number, series: number, seed: number): number {
  return mixed(n, series, seed) / 4294967296;
}

/**
 * Smooth noise from −1 to 1: random values on a lattice of `waveM` metres, joined by cubics.
 * Only sums and products, no sines, so that every machine gives the same bits.
 */
export function noise(x: number, y: number, waveM: number, seed: number): number {
  const u = x / waveM;
  const v = y / waveM;
  const column = Math.floor(u);
  const row = Math.floor(v);
  const fu = eased(u - column);
  const fv = eased(v - row);
  const top = mixed(column, row, seed) * (1 - fu) + mixed(column + 1, row, seed) * fu;
  const bottom = mixed(column, row + 1, seed) * (1 - fu) + mixed(column + 1, row + 1, seed) * fu;
  return (top * (1 - fv) + bottom * fv) / 2147483648 - 1;
}

/** From 0 to 1 with level ends, for t from 0 to 1. */
export function eased(t: number): number {
  const c = Math.min(1, Math.max(0, t));
  return c * c * (3 - 2 * c);
}

/** A wave of parabolas, −1 to 1, zero at whole numbers: a sine without the sine. */
export function wave(t: number): number {
  const half = Math.floor(t);
  const f = t - half;
  return (half % 2 === 0 ? 4 : -4) * f * (1 - f);
}

/** Piecewise linear through knots [position, value], level beyond the ends. */
export function throughKnots(knots: readonly (readonly [number, number])[], at: number): number {
  if (at <= knots[0][0]) return knots[0][1];
  for (let i = 1; i < knots.length; i++) {
    const [to, value] = knots[i];
    const [from, before] = knots[i - 1];
    if (at <= to) return before + ((value - before) * (at - from)) / (to - from);
  }
  return knots[knots.length - 1][1];
}
