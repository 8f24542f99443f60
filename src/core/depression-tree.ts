import { type Depressions, outermostOf } from './depressions.ts';

/**
 * Quick ways through the hierarchy, which on noisy ground is a deep chain. `jump` leads several parents up (skew
 * binary numbers, Myers 1983), so that a search up a chain of n takes about log n steps.
 */
export interface DepressionTree {
  /** Nodes, each after its parent. */
  readonly order: Int32Array;
  readonly outermost: Int32Array;
  readonly jump: Int32Array;
}

export function depressionTree(depressions: Depressions): DepressionTree {
  const { parent } = depressions;
  const count = parent.length;
  const starts = new Int32Array(count + 1);
  for (let node = 0; node < count; node++) if (parent[node] >= 0) starts[parent[node] + 1]++;
  for (let node = 0; node < count; node++) starts[node + 1] += starts[node];
  const next = starts.slice(0, count);
  const children = new Int32Array(starts[count]);
  const order = new Int32Array(count);
  let found = 0;
  for (let node = 0; node < count; node++) {
    if (parent[node] >= 0) children[next[parent[node]]++] = node;
    else order[found++] = node;
  }
  const depth = new Int32Array(count);
  const jump = new Int32Array(count);
  for (let i = 0; i < count; i++) {
    const node = order[i];
    const up = parent[node];
    if (up < 0) jump[node] = node;
    else {
      depth[node] = depth[up] + 1;
      const over = jump[up];
      jump[node] = depth[up] - depth[over] === depth[over] - depth[jump[over]] ? jump[over] : up;
    }
    for (let k = starts[node]; k < starts[node + 1]; k++) order[found++] = children[k];
  }
  return { order, outermost: outermostOf(parent), jump };
}

/** The smallest depression around a leaf whose spill elevation lies above `elevationM`, −1 without one. */
export function smallestAbove(
  depressions: Depressions,
  tree: DepressionTree,
  leaf: number,
  elevationM: number,
): number {
  const { parent, spillElevationM } = depressions;
  const { jump } = tree;
  let node = leaf;
  while (node >= 0 && spillElevationM[node] <= elevationM) {
    node = spillElevationM[jump[node]] <= elevationM && jump[node] !== node ? jump[node] : parent[node];
  }
  return node;
}

/** The largest depression around a leaf whose spill elevation is at most `elevationM`; the leaf itself without one. */
export function largestUpTo(
  depressions: Depressions,
  tree: DepressionTree,
  leaf: number,
  elevationM: number,
): number {
  const { parent, spillElevationM } = depressions;
  const { jump } = tree;
  let node = leaf;
  for (;;) {
    const up = parent[node];
    if (up < 0 || spillElevationM[up] > elevationM) return node;
    node = spillElevationM[jump[node]] <= elevationM ? jump[node] : up;
  }
}
