import { describe, expect, it } from 'vitest';
import { depressionTree, largestUpTo, smallestAbove } from '../../src/core/depression-tree.ts';
import type { Depressions } from '../../src/core/depressions.ts';
import { randomNumbers } from './random-numbers.ts';

/** A random hierarchy in which parents come after their children and spill higher. */
function randomHierarchy(count: number, chain: boolean, next: (below: number) => number): Depressions {
  const parent = new Int32Array(count).fill(-1);
  const spillElevationM = new Float32Array(count);
  for (let node = count - 1; node >= 0; node--) {
    const above = count - 1 - node;
    if (above > 0 && next(20) > 0) parent[node] = chain ? node + 1 : node + 1 + next(above);
    spillElevationM[node] = parent[node] < 0 ? 1000 : spillElevationM[parent[node]] - 1 - next(3);
  }
  const none = new Int32Array(count);
  return {
    leaves: 0,
    parent,
    spillElevationM,
    pitLeaf: none,
    pitElevationM: new Float32Array(count),
    pourSill: none,
    leavingSill: none,
    intoLeaf: none,
    isPond: new Uint8Array(count),
  };
}

describe.each([true, false])('quick ways through a hierarchy, a deep chain: %s', (chain) => {
  it('find what climbing parent by parent finds', () => {
    const next = randomNumbers(61);
    for (let round = 0; round < 60; round++) {
      const hierarchy = randomHierarchy(1 + next(300), chain, next);
      const { parent, spillElevationM } = hierarchy;
      const tree = depressionTree(hierarchy);
      for (let query = 0; query < 60; query++) {
        const leaf = next(parent.length);
        const elevationM = next(2) === 0 ? spillElevationM[next(parent.length)] : 1001 - next(500);
        let smallest = leaf;
        while (smallest >= 0 && spillElevationM[smallest] <= elevationM) smallest = parent[smallest];
        expect(smallestAbove(hierarchy, tree, leaf, elevationM)).toBe(smallest);
        let largest = leaf;
        while (parent[largest] >= 0 && spillElevationM[parent[largest]] <= elevationM)
          largest = parent[largest];
        expect(largestUpTo(hierarchy, tree, leaf, elevationM)).toBe(largest);
      }
      const place = new Map([...tree.order].map((node, i) => [node, i]));
      expect(place.size).toBe(parent.length);
      parent.forEach((up, node) => {
        if (up >= 0) expect(place.get(up)).toBeLessThan(place.get(node) ?? -1);
      });
    }
  });
});

it('a chain of a hundred thousand is climbed in few steps', () => {
  const count = 100_000;
  const hierarchy = randomHierarchy(count, true, () => 1);
  const { jump } = depressionTree(hierarchy);
  let steps = 0;
  for (let node = 0; hierarchy.parent[node] >= 0; node = jump[node]) steps++;
  expect(steps).toBeLessThanOrEqual(2 * Math.ceil(Math.log2(count)));
});
