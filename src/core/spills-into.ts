import { depressionTree, largestUpTo } from './depression-tree.ts';
import type { Depressions } from './depressions.ts';
import { type Drainage, outside } from './drainage.ts';
import type { Survey } from './survey.ts';

/** No pond further down: the overflow leaves by an outlet. */
export const noPond = -1;

/**
 * For each node the next kept pond that its overflow reaches, passing through flats and ponds that are not kept;
 * `noPond` at an outlet. A nested pond spills into the kept pond beside it in the same parent, else where its
 * parent spills.
 */
export function spillsInto(
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  kept: Uint8Array,
): Int32Array {
  const { parent, intoLeaf, spillElevationM } = depressions;
  const { towards, order } = drainage;
  const tops = depressionTree(depressions);
  const { outermost } = tops;
  // The next kept outermost pond that water on a leaf reaches, its own included.
  const reached = new Int32Array(survey.leaves).fill(noPond);
  for (const leaf of order) {
    const isWet = survey.pitElevationM[leaf] < drainage.levelM[leaf];
    if (isWet && kept[outermost[leaf]] === 1) reached[leaf] = outermost[leaf];
    else if (towards[leaf] !== outside) reached[leaf] = reached[towards[leaf]];
  }
  const into = new Int32Array(parent.length).fill(noPond);
  for (const node of tops.order) {
    const beyond = intoLeaf[node];
    if (depressions.isPond[node] === 0 || beyond < 0) continue;
    if (parent[node] < 0) {
      into[node] = reached[beyond];
      continue;
    }
    const beside = largestUpTo(depressions, tops, beyond, spillElevationM[node]);
    into[node] = kept[beside] === 1 ? beside : into[parent[node]];
  }
  return into;
}
