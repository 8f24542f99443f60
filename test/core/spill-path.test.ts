import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { type SpillPath, spillPath } from '../../src/core/spill-path.ts';
import { analysisOf } from './property/analysis.ts';
import type { TerrainCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

function pathOn(terrain: TerrainCase, start: number): SpillPath {
  const { grid, survey, drainage, depressions } = analysisOf(terrain);
  return spillPath(grid, survey, drainage, depressions, start);
}

/** Kind and cells of each leg. */
function legsOf(terrain: TerrainCase, start: number): [string, number[]][] {
  return pathOn(terrain, start).legs.map(({ kind, cells }) => [kind, [...cells]]);
}

/** A profile of one row from which water leaves in the last cell only. */
function profile(text: string, given: Partial<TerrainCase> = {}): TerrainCase {
  const terrain = terrainFromText(text, { edges: 'closed', ...given });
  return { ...terrain, outlets: [{ cell: terrain.width - 1, levelM: Number.NEGATIVE_INFINITY }] };
}

describe('spill path', () => {
  it('runs down the slope, through the pond from its first wet cell to the pour point, and on', () => {
    const path = pathOn(profile('9 7 2 1 3 5 2 0'), 0);
    expect(path.end).toBe('outlet');
    expect(path.legs.map(({ kind, cells }) => [kind, cells])).toEqual([
      ['land', [0, 1, 2]],
      ['pond', [2, 3, 4, 5]],
      ['land', [5, 6, 7]],
    ]);
    expect(
      path.legs.map(({ fromElevationM, toElevationM, lengthM }) => [fromElevationM, toElevationM, lengthM]),
    ).toEqual([
      [9, 5, 2],
      [5, 5, 3],
      [5, 0, 2],
    ]);
  });

  it('passes from pond to pond', () => {
    expect(legsOf(profile('9 1 5 2 4 0'), 1)).toEqual([
      ['pond', [1, 2]],
      ['land', [2, 3]],
      ['pond', [3, 4]],
      ['land', [4, 5]],
    ]);
  });

  it('takes the short way through the water, not by way of the pit', () => {
    const terrain = terrainFromText('9 9 9 9 9 \n 9 3 3 3 4 \n 9 3 3 3 9 \n 9 1 3 3 9 \n 9 9 9 9 9');
    expect(legsOf(terrain, 6)).toEqual([['pond', [6, 7, 8, 9]]]);
  });

  it("measures diagonal steps by the cells' sizes", () => {
    const terrain = terrainFromText('9 9 9 \n 9 5 9 \n 9 9 1', { metrics: 'oblong' });
    expect(pathOn(terrain, 4).legs[0].lengthM).toBeCloseTo(Math.hypot(1.5, 0.7), 12);
  });

  it('ends at an outlet in the pond where the water outside stands above the ground', () => {
    const terrain = { ...profile('9 1 2 2'), outlets: [{ cell: 3, levelM: 6 }] };
    expect(legsOf(terrain, 1)).toEqual([['pond', [1, 2, 3]]]);
  });

  it('is empty from an outlet', () => {
    expect(pathOn(profile('3 2 1'), 2)).toEqual({ legs: [], end: 'outlet' });
  });

  it('ends in the pit of ground without any way to an outlet', () => {
    const path = pathOn(profile('9 2 4 . 1'), 0);
    expect(path.end).toBe('no-way');
    expect(path.legs.map(({ kind, cells }) => [kind, cells])).toEqual([['land', [0, 1]]]);
  });

  it('refuses a void and a cell outside the grid in a sentence', () => {
    for (const start of [3, 5, -1, Number.NaN]) {
      expect(() => pathOn(profile('9 2 4 . 1'), start)).toThrow(
        new OverbrimError(
          'bad-input',
          `The start of the path, cell ${start}, is void or not one of the 5 cells of the terrain; choose a place that has an elevation.`,
        ),
      );
    }
  });
});

describe('what went wrong once', () => {
  it('dry-cell-at-brim-level-taken-for-water: level ground between pond and pour point is land', () => {
    expect(legsOf(profile('9 1 4 4 4 0'), 1)).toEqual([
      ['pond', [1, 2]],
      ['land', [2, 3, 4, 5]],
    ]);
  });

  it('dry-cell-at-brim-level-taken-for-water: from such ground the way first runs down to the water', () => {
    expect(legsOf(profile('9 1 4 4 4 0'), 3)).toEqual([
      ['land', [3, 2, 1]],
      ['pond', [1, 2]],
      ['land', [2, 3, 4, 5]],
    ]);
  });

  it('no-way-across-a-pole: the cells of a row on the pole are one place', () => {
    const terrain = terrainFromText('2 9 9 3 9 9 \n 9 9 9 8 9 9 \n 9 9 9 7 9 9', {
      north: 'pole-row',
      wraps: true,
      metrics: 'geographic',
    });
    expect(legsOf(terrain, 0)).toEqual([
      ['pond', [0, 3, 9]],
      ['land', [9, 15]],
    ]);
    expect(pathOn(terrain, 0).end).toBe('outlet');
  });
});
