import { expect, it } from 'vitest';
import { arcCounts, columnStep, rowStep, sideBits } from '../../src/core/saddles.ts';
import { pieces, type SmallGrid, touching } from './oracles/small-grid.ts';

it('neighbours come row by row and four of them share a side', () => {
  const places = columnStep.map((column, k) => `${rowStep[k]} ${column}`);
  expect(places).toEqual(['-1 -1', '-1 0', '-1 1', '0 -1', '0 1', '1 -1', '1 0', '1 1']);
  for (let k = 0; k < 8; k++)
    expect((sideBits >> k) & 1).toBe(Math.abs(columnStep[k] * rowStep[k]) === 0 ? 1 : 0);
});

it.each([4, 8] as const)(
  'with %i neighbours each mask has as many arcs as its cells have pieces around the cell',
  (neighbours) => {
    const counts = arcCounts(neighbours);
    for (let mask = 0; mask < 256; mask++) {
      // A grid of 3 × 3 whose middle is void and which holds ground where the mask says so.
      const z = new Float32Array(9).fill(Number.NaN);
      for (let k = 0; k < 8; k++) if ((mask >> k) & 1) z[(rowStep[k] + 1) * 3 + columnStep[k] + 1] = 0;
      const grid: SmallGrid = { width: 3, height: 3, z, neighbours, wraps: false, outlets: [] };
      const arcs = pieces(touching(grid), (cell) => z[cell] === 0);
      const sides = [1, 3, 5, 7];
      const reaching =
        neighbours === 8 ? arcs : arcs.filter((arc) => arc.some((cell) => sides.includes(cell)));
      expect(counts[mask], `mask ${mask}`).toBe(reaching.length);
    }
  },
);
