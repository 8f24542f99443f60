import { type DepressionTree, depressionTree, smallestAbove } from './depression-tree.ts';
import type { Depressions } from './depressions.ts';
import { type Drainage, nowhere } from './drainage.ts';
import { highSlice, lowSlice, sliceConstant } from './exact-sum.ts';
import type { Grid } from './grid.ts';
import type { Survey } from './survey.ts';

/** Sizes of brimful depressions, one value a node of the hierarchy (see depressions.ts); nested ones included. */
export interface PondMeasures {
  /** Cells lower than the spill elevation. */
  readonly cells: Float64Array;
  readonly areaM2: Float64Array;
  readonly capacityM3: Float64Array;
  /** Ground whose water reaches the depression without passing through another outside it. */
  readonly catchmentAreaM2: Float64Array;
  /** The same with the ponds that spill into it, and theirs. */
  readonly contributingAreaM2: Float64Array;
  /** 1 where that ground touches the edge of the data, so that more may flow in than is known. */
  readonly touchesEdge: Uint8Array;
}

/**
 * Measures all depressions in one pass over the cells: each wet cell counts for the smallest depression that wets
 * it, and sums run up the tree: V(parent) += V(child) + A(child) · (rise between their spill elevations). Within a
 * depression the sums are free of order (exact-sum.ts), so no tiling changes a bit.
 */
export function pondMeasures(
  grid: Grid,
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
): PondMeasures {
  const tree = depressionTree(depressions);
  const storage = ownStorage(grid, survey, drainage, depressions, tree);
  const inflow = ownInflow(survey, drainage, depressions, tree);
  const { parent, spillElevationM } = depressions;
  for (let i = tree.order.length - 1; i >= 0; i--) {
    const node = tree.order[i];
    const up = parent[node];
    if (up < 0) continue;
    storage.cells[up] += storage.cells[node];
    if (storage.cells[node] > 0) {
      const rise = spillElevationM[up] - spillElevationM[node];
      storage.capacityM3[up] += storage.capacityM3[node] + storage.areaM2[node] * rise;
      storage.areaM2[up] += storage.areaM2[node];
    }
    inflow.catchmentAreaM2[up] += inflow.catchmentAreaM2[node];
    inflow.contributingAreaM2[up] += inflow.contributingAreaM2[node];
    inflow.touchesEdge[up] |= inflow.touchesEdge[node];
  }
  if (grid.metrics.uniform) {
    const cellM2 = grid.metrics.areaM2[0];
    for (let node = 0; node < parent.length; node++) {
      storage.areaM2[node] *= cellM2;
      storage.capacityM3[node] *= cellM2;
    }
  }
  return { ...storage, ...inflow };
}

/** What each depression holds in cells that no smaller one wets; on uniform grids in cells and metres × cells. */
function ownStorage(
  grid: Grid,
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  tree: DepressionTree,
): { cells: Float64Array; areaM2: Float64Array; capacityM3: Float64Array } {
  const { elevationM, metrics, width, height } = grid;
  const { leaf } = survey;
  const { levelM } = drainage;
  const { pitElevationM, spillElevationM } = depressions;
  const count = spillElevationM.length;
  const areaBound = metrics.uniform ? 1 : metrics.areaBoundM2;
  const areaConstant = sliceConstant(areaBound);
  // Four numbers a node, side by side in memory: cells, both slices of the volume, the constant that cuts them.
  const sums = new Float64Array(count * 4);
  for (let node = 0; node < count; node++) {
    const depth = spillElevationM[node] - pitElevationM[node];
    if (depth < Number.POSITIVE_INFINITY) sums[node * 4 + 3] = sliceConstant(depth * areaBound);
  }
  const areaHigh = new Float64Array(metrics.uniform ? 0 : count);
  const areaLow = new Float64Array(metrics.uniform ? 0 : count);
  for (let row = 0; row < height; row++) {
    const area = metrics.uniform ? 1 : metrics.areaM2[row];
    const high = highSlice(area, areaConstant);
    const low = lowSlice(area, high, areaConstant);
    for (let cell = row * width; cell < (row + 1) * width; cell++) {
      const l = leaf[cell];
      if (l < 0) continue;
      const z = elevationM[cell];
      const level = levelM[l];
      if (!(z < level) || level === Number.POSITIVE_INFINITY) continue;
      const node = z < spillElevationM[l] ? l : smallestAbove(depressions, tree, l, z);
      const at = node * 4;
      const volume = (spillElevationM[node] - z) * area;
      const constant = sums[at + 3];
      const first = highSlice(volume, constant);
      sums[at]++;
      sums[at + 1] += first;
      sums[at + 2] += lowSlice(volume, first, constant);
      if (metrics.uniform) continue;
      areaHigh[node] += high;
      areaLow[node] += low;
    }
  }
  const cells = new Float64Array(count);
  const areaM2 = new Float64Array(count);
  const capacityM3 = new Float64Array(count);
  for (let node = 0; node < count; node++) {
    cells[node] = sums[node * 4];
    areaM2[node] = metrics.uniform ? cells[node] : areaHigh[node] + areaLow[node];
    capacityM3[node] = sums[node * 4 + 1] + sums[node * 4 + 2];
  }
  return { cells, areaM2, capacityM3 };
}

/** What runs to each depression through leaves that no smaller one wets. */
function ownInflow(
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  tree: DepressionTree,
): { catchmentAreaM2: Float64Array; contributingAreaM2: Float64Array; touchesEdge: Uint8Array } {
  const count = depressions.spillElevationM.length;
  const { leaves } = survey;
  const { levelM, towards, order } = drainage;
  const isWet = (leaf: number): boolean =>
    survey.pitElevationM[leaf] < levelM[leaf] && towards[leaf] !== nowhere;
  const touches = new Uint8Array(leaves);
  for (const leaf of survey.rimLeaf) touches[leaf] = 1;
  for (const leaf of survey.besideLeaf) touches[leaf] = 1;
  // Area that arrives at a leaf: straight from ground (direct), with ponds above (from outside its own pond), in all.
  const direct = survey.areaM2.slice();
  const fromOutside = survey.areaM2.slice();
  const whole = survey.areaM2.slice();
  const touchesInAll = touches.slice();
  for (let i = order.length - 1; i >= 0; i--) {
    const leaf = order[i];
    const into = towards[leaf];
    if (into < 0) continue;
    const samePond = isWet(leaf) && isWet(into) && tree.outermost[leaf] === tree.outermost[into];
    whole[into] += whole[leaf];
    touchesInAll[into] |= touchesInAll[leaf];
    if (!isWet(leaf)) direct[into] += direct[leaf];
    if (samePond) continue;
    fromOutside[into] += whole[leaf];
    touches[into] |= touchesInAll[leaf];
  }
  const catchmentAreaM2 = new Float64Array(count);
  const contributingAreaM2 = new Float64Array(count);
  const touchesEdge = new Uint8Array(count);
  for (let leaf = 0; leaf < leaves; leaf++) {
    if (!isWet(leaf)) continue;
    const node = smallestAbove(depressions, tree, leaf, survey.pitElevationM[leaf]);
    catchmentAreaM2[node] += direct[leaf];
    contributingAreaM2[node] += fromOutside[leaf];
    touchesEdge[node] |= touches[leaf];
  }
  return { catchmentAreaM2, contributingAreaM2, touchesEdge };
}
