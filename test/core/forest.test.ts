import { describe, expect, it } from 'vitest';
import { emptySills, type Sills, setSill, sillOrder, spanningForest } from '../../src/core/forest.ts';
import { randomNumbers } from './random-numbers.ts';

function randomSills(count: number, leaves: number, next: (below: number) => number): Sills {
  const sills = emptySills(count);
  for (let i = 0; i < count; i++) {
    const a = next(leaves);
    setSill(sills, i, next(6) - 3, next(9) - 1, next(1000), a, (a + 1 + next(leaves - 1)) % leaves);
  }
  return sills;
}

describe('sills', () => {
  it('are ordered by elevation, sill cell, other cell, the outside first', () => {
    const sills = emptySills(5);
    setSill(sills, 0, 2, 7, 3, 0, 1);
    setSill(sills, 1, 2, 7, -1, 0, 1);
    setSill(sills, 2, -2, 9, 8, 0, 1);
    setSill(sills, 3, 2, 5, 4, 0, 1);
    setSill(sills, 4, -3, 9, 9, 0, 1);
    expect([...sillOrder(sills)]).toEqual([4, 2, 3, 1, 0]);
  });
});

describe('the spanning forest', () => {
  it('is that of adding the lowest sill that closes no circle, one by one', () => {
    const next = randomNumbers(53);
    for (let round = 0; round < 200; round++) {
      const leaves = 2 + next(12);
      const sills = randomSills(next(40), leaves, next);
      const set = Array.from({ length: leaves }, (_, leaf) => leaf);
      const expected: number[] = [];
      for (const at of sillOrder(sills)) {
        const [a, b] = [set[sills.sillLeaf[at]], set[sills.otherLeaf[at]]];
        if (a === b) continue;
        expected.push(at);
        set.forEach((s, leaf) => {
          if (s === b) set[leaf] = a;
        });
      }
      expect([...spanningForest(leaves, sills)]).toEqual(expected);
    }
  });

  it('of nothing is nothing', () => {
    expect([...spanningForest(3, emptySills(0))]).toEqual([]);
  });
});
