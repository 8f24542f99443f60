/**
 * The total order that settles every choice: cells by (elevation, row-major index), sills by (elevation, index of
 * the sill cell, index of the other cell). Sorting goes through unsigned integers that keep the order of float32.
 */

/** Unsigned integers in the order of the given float32 values (no NaN; −0 must have been made 0). */
export function orderedKeys(values: Float32Array): Uint32Array {
  const bits = new Uint32Array(values.buffer, values.byteOffset, values.length);
  const keys = new Uint32Array(values.length);
  for (let i = 0; i < keys.length; i++) {
    const b = bits[i];
    keys[i] = b & 0x80000000 ? ~b : b | 0x80000000;
  }
  return keys;
}

/** The low and the high half of cell indices (−1 = outside, comes first), for sorting; least significant first. */
export function keyHalves(cells: Float64Array): [Uint32Array, Uint32Array] {
  const low = new Uint32Array(cells.length);
  const high = new Uint32Array(cells.length);
  for (let i = 0; i < cells.length; i++) {
    const cell = cells[i] + 1;
    low[i] = cell >>> 0;
    high[i] = cell / 4294967296;
  }
  return [low, high];
}

const digitBits = 11;
const digits = 1 << digitBits;

/**
 * Positions 0…count−1 sorted by several keys, the least significant key first; equal ones keep their order.
 * Least-significant-digit radix sort; a digit that is the same everywhere costs one look.
 */
export function stableOrder(count: number, keysLeastFirst: readonly Uint32Array[]): Uint32Array {
  let order = new Uint32Array(count);
  for (let i = 0; i < count; i++) order[i] = i;
  let spare = new Uint32Array(count);
  const starts = new Uint32Array(digits);
  for (const keys of keysLeastFirst) {
    for (let shift = 0; shift < 32; shift += digitBits) {
      starts.fill(0);
      for (let i = 0; i < count; i++) starts[(keys[i] >>> shift) & (digits - 1)]++;
      if (count === 0 || starts[(keys[0] >>> shift) & (digits - 1)] === count) continue;
      let sum = 0;
      for (let d = 0; d < digits; d++) {
        const n = starts[d];
        starts[d] = sum;
        sum += n;
      }
      for (let i = 0; i < count; i++) {
        const at = order[i];
        spare[starts[(keys[at] >>> shift) & (digits - 1)]++] = at;
      }
      [order, spare] = [spare, order];
    }
  }
  return order;
}
