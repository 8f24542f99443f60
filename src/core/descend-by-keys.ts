import { lowestBit, pitMark, setInverseDistances, steps, voidMark } from './descend.ts';
import type { ReceiverRoom } from './receiver-room.ts';
import { sideBits } from './saddles.ts';
import type { TileWindow } from './tile-window.ts';

/**
 * The quick pass, same bits: elevations as integers in the same order, so that signs of differences take the place
 * of branches. False, with nothing done, when a tile's elevations lie too far apart for 32-bit differences.
 */
export function descendByKeys(window: TileWindow, room: ReceiverRoom): boolean {
  const { width, height } = window.tile;
  const { to, lower, keys } = room;
  const z = window.elevationM;
  if (!setKeys(z, keys)) return false;
  const stride = width + 2;
  const step = steps(stride);
  const inverse = new Float64Array(8);
  const diagonals = window.neighbours === 8;
  const allowed = diagonals ? 0b11111111 : sideBits;
  for (let r = 1; r <= height; r++) {
    setInverseDistances(inverse, window, r - 1);
    const inverseNS = inverse[1];
    const inverseWE = inverse[3];
    const inverseD = diagonals ? inverse[0] : 0;
    const start = r * stride;
    for (let i = start + 1; i <= start + width; i++) {
      const own = keys[i];
      if (own === voidKey) {
        to[i] = voidMark;
        lower[i] = 0;
        continue;
      }
      const nw = keys[i - stride - 1] - own;
      const n = keys[i - stride] - own;
      const ne = keys[i - stride + 1] - own;
      const w = keys[i - 1] - own;
      const e = keys[i + 1] - own;
      const sw = keys[i + stride - 1] - own;
      const s = keys[i + stride] - own;
      const se = keys[i + stride + 1] - own;
      // Neighbours that come before the cell are lower when equal, those after it are not.
      const mask =
        ((nw - 1) >>> 31) |
        (((n - 1) >>> 31) << 1) |
        (((ne - 1) >>> 31) << 2) |
        (((w - 1) >>> 31) << 3) |
        ((e >>> 31) << 4) |
        ((sw >>> 31) << 5) |
        ((s >>> 31) << 6) |
        ((se >>> 31) << 7);
      lower[i] = mask;
      // `less` is all ones where the next is lower than the least so far, else zero.
      let less = (s - n) >> 31;
      const leastNS = n + ((s - n) & less);
      const kNS = 1 + (5 & less);
      less = (e - w) >> 31;
      const leastWE = w + ((e - w) & less);
      const kWE = 3 + (1 & less);
      less = (ne - nw) >> 31;
      let leastD = nw + ((ne - nw) & less);
      let kD = 2 & less;
      less = (sw - leastD) >> 31;
      leastD += (sw - leastD) & less;
      kD += (5 - kD) & less;
      less = (se - leastD) >> 31;
      leastD += (se - leastD) & less;
      kD += (7 - kD) & less;
      const anyLower = diagonals ? leastNS | leastWE | leastD : leastNS | leastWE;
      if (anyLower >= 0) {
        const equal = mask & allowed;
        to[i] = equal === 0 ? pitMark : i + step[lowestBit(equal)];
        continue;
      }
      const z0 = z[i];
      let k = kNS;
      let steepest = leastNS < 0 ? (z0 - z[i + step[kNS]]) * inverseNS : -1;
      const slopeWE = leastWE < 0 ? (z0 - z[i + step[kWE]]) * inverseWE : -1;
      if (slopeWE > steepest || (slopeWE === steepest && kWE < k)) {
        steepest = slopeWE;
        k = kWE;
      }
      const slopeD = leastD < 0 && diagonals ? (z0 - z[i + step[kD]]) * inverseD : -1;
      if (slopeD > steepest || (slopeD === steepest && kD < k)) k = kD;
      to[i] = i + step[k];
    }
  }
  return true;
}

/** The key of voids and of what lies beyond the grid: above all others. */
const voidKey = 0x7fffffff;

/** Integers from 0 in the order of the elevations; false when they span more than 31 bits. */
function setKeys(z: Float32Array, keys: Int32Array): boolean {
  const bits = new Int32Array(z.buffer, z.byteOffset, z.length);
  let least = voidKey;
  let most = -0x80000000;
  for (let i = 0; i < bits.length; i++) {
    const b = bits[i];
    const key = b ^ ((b >> 31) & 0x7fffffff);
    // Not-a-number lies above infinity in this order, or below it with the sign bit set.
    if (key > 0x7f800000 || key < -0x7f800001) {
      keys[i] = voidKey;
      continue;
    }
    keys[i] = key;
    if (key < least) least = key;
    if (key > most) most = key;
  }
  if (most - least >= voidKey) return false;
  for (let i = 0; i < bits.length; i++) if (keys[i] !== voidKey) keys[i] -= least;
  return true;
}
