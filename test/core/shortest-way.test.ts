import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { distanceM } from '../../src/core/cell-steps.ts';
import { shortestWay } from '../../src/core/shortest-way.ts';
import { touching } from './oracles/small-grid.ts';
import { check } from './property/check.ts';
import { oracleGrid } from './property/oracle-grid.ts';
import { gridOfCase, terrainCases } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

describe('the shortest way', () => {
  it('is as long as relaxing all steps until none helps (Bellman 1958) finds, through allowed cells', () => {
    const draws = fc.tuple(terrainCases({ width: 8, height: 7 }), fc.nat(), fc.nat());
    check(2000, draws, ([terrain, a, b]) => {
      const grid = gridOfCase(terrain);
      const ground = [...terrain.z.keys()].filter((cell) => !Number.isNaN(terrain.z[cell]));
      const [from, to] = [ground[a % ground.length], ground[b % ground.length]];
      const allows = (cell: number): boolean => !Number.isNaN(terrain.z[cell]) && (cell * 7 + a) % 3 !== 0;
      const touch = touching(oracleGrid(terrain));
      const far = new Array<number>(terrain.z.length).fill(Number.POSITIVE_INFINITY);
      far[from] = 0;
      for (let changed = true; changed; ) {
        changed = false;
        for (const cell of ground) {
          for (const next of touch[cell]) {
            if (next !== to && !allows(next)) continue;
            const length = far[cell] + distanceM(grid, cell, next);
            if (length >= far[next]) continue;
            far[next] = length;
            changed = true;
          }
        }
      }
      const way = shortestWay(grid, terrain.neighbours, from, to, allows);
      expect(way === undefined).toBe(far[to] === Number.POSITIVE_INFINITY);
      if (way === undefined) return;
      expect([way[0], way[way.length - 1]]).toEqual([from, to]);
      let length = 0;
      for (let i = 1; i < way.length; i++) {
        expect(touch[way[i - 1]]).toContain(way[i]);
        if (i < way.length - 1) expect(allows(way[i])).toBe(true);
        length += distanceM(grid, way[i - 1], way[i]);
      }
      expect(Math.abs(length - far[to])).toBeLessThanOrEqual(1e-8 * far[to]);
    });
  });

  it('from a cell to itself is that cell', () => {
    expect(shortestWay(gridOfCase(terrainFromText('1 2')), 8, 1, 1, () => false)).toEqual([1]);
  });

  it('goes the short way round where the grid wraps', () => {
    const grid = gridOfCase(terrainFromText('1 1 1 1 1 1', { wraps: true }));
    expect(shortestWay(grid, 4, 1, 5, () => true)).toEqual([1, 0, 5]);
  });
});
