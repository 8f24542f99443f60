import { packed } from './packed-colour.ts';
import type { DepthClass } from './palette.ts';

/** Depth classes as the painting loop reads them. */
export interface DepthColours {
  readonly fromM: Float64Array;
  readonly colour: Uint32Array;
}

/** Sorts classes by depth and packs their colours. */
export function depthColours(classes: readonly DepthClass[]): DepthColours {
  const sorted = [...classes].sort((one, other) => one.fromM - other.fromM);
  return {
    fromM: Float64Array.from(sorted, ({ fromM }) => fromM),
    colour: Uint32Array.from(sorted, ({ colour }) => packed(colour)),
  };
}

/**
 * Paints samples by depth = level of the leaf − ground; transparent where dry, void, or without a level (+∞).
 * A depth below the first class still is wet, and takes its colour.
 * @param groundM metres a sample
 * @param leaf leaf a sample, −1 = none
 * @param levelM water level a leaf, metres
 * @param out packed colours
 */
export function paintDepths(
  groundM: Float32Array,
  leaf: Int32Array,
  levelM: Float32Array,
  { fromM, colour }: DepthColours,
  out: Uint32Array,
): void {
  const last = fromM.length - 1;
  for (let at = 0; at < out.length; at++) {
    const l = leaf[at];
    let paint = 0;
    if (l >= 0) {
      const depth = levelM[l] - groundM[at];
      if (depth > 0 && depth < Number.POSITIVE_INFINITY) {
        let k = last;
        while (k > 0 && depth < fromM[k]) k--;
        paint = colour[k];
      }
    }
    out[at] = paint;
  }
}
