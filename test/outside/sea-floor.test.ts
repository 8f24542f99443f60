import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { deepestOnly, filled, realGrid } from './filled.ts';

/**
 * The sea floor as a check; common practice of the trade, no source: a coarse grid closes a narrow strait; a cell
 * that first drowns when the water is higher than itself lies in a landlocked basin and that level is its lake's.
 * Levels: measured beforehand with an independent heap-based flood (`measured`), and by a spanning tree in scipy
 * (recorded/sea-floor.json); both from the deepest cell of the ocean, longitude wrapping.
 */
const recorded = JSON.parse(readFileSync(new URL('recorded/sea-floor.json', import.meta.url), 'utf8'));

const measured: Record<string, Record<string, number>> = {
  etopo60: { Mediterranean: 125.3 },
  etopo20: {
    Mediterranean: -103.5,
    'Gulf of Mexico': -1939.9,
    'North Atlantic west basin': -3695.1,
    Arctic: -833.7,
    'Sea of Japan': -110.2,
  },
};

describe.each(['etopo60', 'etopo20'] as const)('%s', async (name) => {
  const grid = await realGrid(name);

  it.each([8, 4] as const)('drowns basins at the recorded levels, %i neighbours', (neighbours) => {
    const { levelM } = filled(grid, neighbours, deepestOnly(grid));
    const { deepestCell, basins } = recorded.grids[`${name}-${neighbours}`];
    expect(deepestOnly(grid).cells.cell[0]).toBe(deepestCell);
    for (const [basin, { cell, levelM: level }] of Object.entries<{ cell: number; levelM: number }>(basins)) {
      expect(levelM[cell], basin).toBe(Math.fround(level));
    }
  });

  it('agrees with the levels measured before, to the last digit given', () => {
    const { levelM } = filled(grid, 8, deepestOnly(grid));
    for (const [basin, level] of Object.entries(measured[name])) {
      const { cell } = recorded.grids[`${name}-8`].basins[basin];
      expect(Math.abs(levelM[cell] - level), basin).toBeLessThanOrEqual(0.05);
    }
  });

  it('keeps a cell dry of standing water exactly where everything drowns at its own height', () => {
    const { levelM } = filled(grid, 8, deepestOnly(grid));
    const { cell } = recorded.grids[`${name}-8`].basins.Mediterranean;
    expect(levelM[cell]).toBeGreaterThan(grid.elevationM[cell]);
    expect(levelM[recorded.grids[`${name}-8`].deepestCell]).toBe(
      grid.elevationM[recorded.grids[`${name}-8`].deepestCell],
    );
  });
});

describe('the strait', async () => {
  it('is closed by the coarse grid and open on the finer one', async () => {
    const level = async (name: 'etopo60' | 'etopo20'): Promise<number> => {
      const grid = await realGrid(name);
      return filled(grid, 8, deepestOnly(grid)).levelM[recorded.grids[`${name}-8`].basins.Mediterranean.cell];
    };
    expect(await level('etopo60')).toBeGreaterThan(0);
    expect(await level('etopo20')).toBeLessThan(0);
  });
});
