import { voidMark } from './descend.ts';
import type { Receivers } from './receivers.ts';
import type { TileWindow } from './tile-window.ts';

/** Label of a void cell and of a halo position that nothing refers to. */
export const noLabel = -1;
const unset = -2;
const outside = -3;

/**
 * Catchments of a tile. Labels 0…pitCount−1 are its pits, row by row; the labels after them are provisional and
 * stand for halo cells: the way goes on in another tile and is redirected when that one is known.
 */
export interface Labels {
  /** Label of each window position. */
  readonly label: Int32Array;
  readonly pitCount: number;
  /** Window positions of the halo cells that labels pitCount, pitCount + 1, … stand for; grows as sills refer to more. */
  readonly halo: number[];
}

/** Follows receivers to a pit or out of the tile; each cell is walked at most twice. */
export function labelsOf(window: TileWindow, receivers: Receivers, label: Int32Array): Labels {
  const { width, height } = window.tile;
  const { to, pits, pitCount } = receivers;
  const stride = width + 2;
  label.fill(unset);
  label.fill(outside, 0, stride);
  label.fill(outside, (height + 1) * stride);
  for (let r = 1; r <= height; r++) label[r * stride] = label[r * stride + stride - 1] = outside;
  for (let p = 0; p < pitCount; p++) label[pits[p]] = p;
  const labels: Labels = { label, pitCount, halo: [] };
  for (let r = 1; r <= height; r++) {
    const start = r * stride;
    for (let i = start + 1; i <= start + width; i++) {
      if (label[i] !== unset) continue;
      if (to[i] === voidMark) {
        label[i] = noLabel;
        continue;
      }
      let at = to[i];
      let found = label[at];
      while (found === unset) {
        at = to[at];
        found = label[at];
      }
      if (found === outside) found = haloLabel(labels, at);
      for (let back = i; label[back] === unset; back = to[back]) label[back] = found;
    }
  }
  return labels;
}

/** The provisional label of a halo position, made when first asked for. */
export function haloLabel(labels: Labels, position: number): number {
  const { label, halo, pitCount } = labels;
  if (label[position] < 0) label[position] = pitCount + halo.push(position) - 1;
  return label[position];
}
