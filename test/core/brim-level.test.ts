import { expect, it } from 'vitest';
import { analysisOf } from './property/analysis.ts';
import { terrainFromText } from './terrain-from-text.ts';

const none = Number.NaN;

// Expected levels are read off the grids by eye.
it('the brim level is the ground or the water above it', () => {
  const { levelM } = analysisOf(terrainFromText('5 5 5 5 \n 5 1 4 5 \n 5 2 5 3 \n 5 5 5 5'));
  expect([...levelM]).toEqual([5, 5, 5, 5, 5, 4, 4, 5, 5, 4, 5, 3, 5, 5, 5, 5]);
});

it('voids and ground without any way to an outlet have none', () => {
  const closed = { edges: 'closed', outlets: [{ cell: 0, levelM: 2 }] } as const;
  expect([...analysisOf(terrainFromText('1 3 . 4 1', closed)).levelM]).toEqual([2, 3, none, none, none]);
});
