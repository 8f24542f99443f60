import { describe, expect, it } from 'vitest';
import { gridOf } from '../../src/core/grid.ts';
import { geographicMetrics, projectedMetrics } from '../../src/core/metrics.ts';
import { cellAt, columnBeside, shapeOf, tilesOf, tileWindow } from '../../src/core/tile-window.ts';

const none = Number.NaN;

/** A grid whose elevations are its cells' indices plus 1. */
function counted(width: number, height: number, wraps = false) {
  const z = Float32Array.from({ length: width * height }, (_, i) => i + 1);
  return gridOf(width, height, z, projectedMetrics(height, 1, 1), {
    wraps,
    north: 'beyond',
    south: 'beyond',
  });
}

function windowOf(width: number, height: number, wraps: boolean, size: number, n: number): number[] {
  return [...tileWindow(counted(width, height, wraps), tilesOf(width, height, size)[n], 8, []).elevationM];
}

describe('tiles', () => {
  it('cover each cell once, row by row, smaller at the far sides', () => {
    const tiles = tilesOf(5, 3, 2);
    expect(tiles.length).toBe(6);
    expect(tiles[0]).toEqual({ column: 0, row: 0, width: 2, height: 2 });
    expect(tiles[5]).toEqual({ column: 4, row: 2, width: 1, height: 1 });
    const covered = tiles.flatMap(({ column, row, width, height }) =>
      Array.from(
        { length: width * height },
        (_, i) => (row + Math.floor(i / width)) * 5 + column + (i % width),
      ),
    );
    expect(covered.sort((a, b) => a - b)).toEqual(Array.from({ length: 15 }, (_, i) => i));
  });
});

describe('a tile with its halo', () => {
  it('holds the cells around it', () => {
    expect(windowOf(4, 3, false, 2, 0)).toEqual([
      none,
      none,
      none,
      none,
      none,
      1,
      2,
      3,
      none,
      5,
      6,
      7,
      none,
      9,
      10,
      11,
    ]);
    expect(windowOf(4, 3, false, 2, 3)).toEqual([6, 7, 8, none, 10, 11, 12, none, none, none, none, none]);
  });

  it('holds the other side across the seam of a wrapped grid', () => {
    expect(windowOf(3, 1, true, 8, 0)).toEqual([
      none,
      none,
      none,
      none,
      none,
      3,
      1,
      2,
      3,
      1,
      none,
      none,
      none,
      none,
      none,
    ]);
    expect(windowOf(4, 2, true, 2, 1)).toEqual([
      none,
      none,
      none,
      none,
      2,
      3,
      4,
      1,
      6,
      7,
      8,
      5,
      none,
      none,
      none,
      none,
    ]);
  });

  it('of a single row or column has void all around', () => {
    expect(windowOf(2, 1, false, 8, 0)).toEqual([
      none,
      none,
      none,
      none,
      none,
      1,
      2,
      none,
      none,
      none,
      none,
      none,
    ]);
    expect(windowOf(1, 2, false, 8, 0)).toEqual([
      none,
      none,
      none,
      none,
      1,
      none,
      none,
      2,
      none,
      none,
      none,
      none,
    ]);
    expect(windowOf(1, 1, false, 1, 0)).toEqual([none, none, none, none, 1, none, none, none, none]);
  });

  it("knows the whole grid's cell of each of its places, and none beyond", () => {
    for (const wraps of [false, true]) {
      const grid = counted(5, 4, wraps);
      for (const tile of tilesOf(5, 4, 3)) {
        tileWindow(grid, tile, 8, []).elevationM.forEach((z, position) => {
          expect(cellAt(position, tile, shapeOf(grid))).toBe(Number.isNaN(z) ? -1 : z - 1);
        });
      }
    }
  });

  it('names the column beside a seam or none beyond the data', () => {
    const shape = shapeOf(counted(5, 4, true));
    expect([-1, 0, 4, 5].map((column) => columnBeside(column, shape))).toEqual([4, 0, 4, 0]);
    expect([-1, 5].map((column) => columnBeside(column, { ...shape, wraps: false }))).toEqual([-1, -1]);
  });

  it('takes along the sizes of its own rows and the made pits among its cells', () => {
    const grid = gridOf(4, 4, new Float32Array(16), geographicMetrics(4, 60, 1, 1));
    const tile = { column: 2, row: 2, width: 2, height: 2 };
    const window = tileWindow(grid, tile, 4, [0, 5, 10, 13, 15]);
    expect([...window.areaM2]).toEqual([grid.metrics.areaM2[2], grid.metrics.areaM2[3]]);
    expect([...window.eastM]).toEqual([grid.metrics.eastM[2], grid.metrics.eastM[3]]);
    expect(window.madePits).toEqual([5, 10]);
    expect(window.neighbours).toBe(4);
    expect(window.areaBoundM2).toBe(grid.metrics.areaM2[3]);
  });
});
