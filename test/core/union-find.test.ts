import { expect, it } from 'vitest';
import { UnionFind } from '../../src/core/union-find.ts';
import { randomNumbers } from './random-numbers.ts';

it('starts with every member alone', () => {
  const sets = new UnionFind(3);
  expect([0, 1, 2].map((member) => sets.root(member))).toEqual([0, 1, 2]);
});

it('tells the root of the whole when it joins, also of a set with itself', () => {
  const sets = new UnionFind(4);
  const root = sets.join(0, 1);
  expect(sets.root(0)).toBe(root);
  expect(sets.root(1)).toBe(root);
  expect(sets.join(root, root)).toBe(root);
  expect(sets.root(2)).toBe(2);
});

it('lets the larger set keep its root', () => {
  const sets = new UnionFind(4);
  const pair = sets.join(0, 1);
  expect(sets.join(2, pair)).toBe(pair);
  expect(sets.join(sets.root(0), 3)).toBe(pair);
});

it('agrees with relabelling everything, on random joins', () => {
  const next = randomNumbers(5);
  const count = 200;
  const sets = new UnionFind(count);
  const label = Array.from({ length: count }, (_, i) => i);
  for (let round = 0; round < 300; round++) {
    const [a, b] = [next(count), next(count)];
    sets.join(sets.root(a), sets.root(b));
    const [from, to] = [label[a], label[b]];
    label.forEach((l, i) => {
      if (l === from) label[i] = to;
    });
    const [c, d] = [next(count), next(count)];
    expect(sets.root(c) === sets.root(d)).toBe(label[c] === label[d]);
  }
});
