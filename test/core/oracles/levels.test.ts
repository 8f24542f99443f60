import { describe, expect, it } from 'vitest';
import { gridFromText } from './sample-grids.ts';
import type { SmallGrid } from './small-grid.ts';
import { sweptLevels } from './swept-levels.ts';
import { thresholdLevels } from './threshold-levels.ts';

const { NaN: none, POSITIVE_INFINITY: never, NEGATIVE_INFINITY: ground } = Number;

// Expected levels are read off the grids by eye.
const cases: { name: string; grid: SmallGrid; level: number[] }[] = [
  {
    name: 'a pit is filled to the lowest place of its rim',
    grid: gridFromText('5 5 5 \n 5 1 5 \n 5 5 3'),
    level: [5, 5, 5, 5, 3, 5, 5, 5, 3],
  },
  {
    name: 'with four neighbours no water passes a corner',
    grid: gridFromText('5 5 5 \n 5 1 4 \n 5 5 3', { neighbours: 4 }),
    level: [5, 5, 5, 5, 4, 4, 5, 5, 3],
  },
  {
    name: 'a void is a wall and has no level',
    grid: gridFromText('9 9 9 9 \n 9 1 . 9 \n 9 9 9 9', { outlets: [{ cell: 3, levelM: ground }] }),
    level: [9, 9, 9, 9, 9, 9, none, 9, 9, 9, 9, 9],
  },
  {
    name: 'ground cut off by voids from all outlets has no finite level',
    grid: gridFromText('1 . 7 2', { outlets: [{ cell: 0, levelM: ground }] }),
    level: [1, none, never, never],
  },
  {
    name: 'water that stands higher outside holds water back inside',
    grid: gridFromText('2 1 3 8', { outlets: [{ cell: 0, levelM: 4 }] }),
    level: [4, 4, 4, 8],
  },
  {
    name: 'an outlet at a high level still drains through a lower one',
    grid: gridFromText('2 1 3 0', {
      outlets: [
        { cell: 0, levelM: 4 },
        { cell: 3, levelM: ground },
      ],
    }),
    level: [3, 3, 3, 0],
  },
  {
    name: 'first and last column touch where the grid wraps',
    grid: gridFromText('1 9 2 4 3', { wraps: true, outlets: [{ cell: 3, levelM: ground }] }),
    level: [4, 9, 4, 4, 4],
  },
  {
    name: 'a row on a pole is one place',
    grid: gridFromText('3 9 1 9 \n 9 9 9 9', { onePlaceRows: [0], outlets: [{ cell: 0, levelM: ground }] }),
    level: [3, 9, 3, 9, 9, 9, 9, 9],
  },
  {
    name: 'elevations below zero and a tie',
    grid: gridFromText('-1 -7 -1 -5 -2', { neighbours: 4, outlets: [{ cell: 4, levelM: ground }] }),
    level: [-1, -1, -1, -2, -2],
  },
];

describe.each(cases)('$name', ({ grid, level }) => {
  it('by thresholds', () => {
    expect([...thresholdLevels(grid)]).toEqual(level);
  });
  it('by sweeps', () => {
    expect([...sweptLevels(grid)]).toEqual(level);
  });
});

it('both ways agree on 500 random grids of few elevations, whatever the rules', () => {
  let state = 20_240_607;
  const below = (n: number): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 4294967296) * n);
  };
  for (let round = 0; round < 500; round++) {
    const width = 3 + below(5);
    const height = 1 + below(6);
    const cells = width * height;
    const z = Float32Array.from({ length: cells }, () => (below(8) === 0 ? none : below(5) - 2));
    const outlets = Array.from({ length: below(4) }, () => ({
      cell: below(cells),
      levelM: below(2) === 0 ? ground : below(6) - 2,
    }));
    const grid: SmallGrid = {
      width,
      height,
      z,
      neighbours: below(2) === 0 ? 4 : 8,
      wraps: below(2) === 0,
      onePlaceRows: below(3) === 0 ? [0] : [],
      outlets,
    };
    expect([...sweptLevels(grid)], `round ${round}`).toEqual([...thresholdLevels(grid)]);
  }
});
