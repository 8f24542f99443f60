import { describe, expect, it } from 'vitest';
import { pitMark, voidMark } from '../../src/core/descend.ts';
import { receiverRoom } from '../../src/core/receiver-room.ts';
import { receiversOf } from '../../src/core/receivers.ts';
import { arcCounts } from '../../src/core/saddles.ts';
import { cellAt, shapeOf, tilesOf, tileWindow } from '../../src/core/tile-window.ts';
import { check } from './property/check.ts';
import { gridOfCase, metricsOfCase, type TerrainCase, terrainCases } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const offsets = [
  [-1, -1],
  [-1, 0],
  [-1, 1],
  [0, -1],
  [0, 1],
  [1, -1],
  [1, 0],
  [1, 1],
];

/** The eight places around a cell in row order, −1 beyond the grid. */
function placesAround({ width, height, wraps }: TerrainCase, cell: number): number[] {
  return offsets.map(([dr, dc]) => {
    const row = Math.floor(cell / width) + dr;
    const column = wraps ? ((cell % width) + dc + width) % width : (cell % width) + dc;
    return row < 0 || row >= height || column < 0 || column >= width ? -1 : row * width + column;
  });
}

/** Plain and slow, cell by cell from the words: the receiver, or the cell itself when it is a pit. */
function slowReceiver(terrain: TerrainCase, cell: number): number {
  const { z, neighbours, width, madePits } = terrain;
  if (madePits.includes(cell)) return cell;
  const metrics = metricsOfCase(terrain);
  const row = Math.floor(cell / width);
  const known = placesAround(terrain, cell)
    .map((other, k) => ({ other, k, isDiagonal: offsets[k][0] !== 0 && offsets[k][1] !== 0 }))
    .filter(
      ({ other, isDiagonal }) => other >= 0 && !Number.isNaN(z[other]) && !(isDiagonal && neighbours === 4),
    );
  const lower = known.filter(({ other }) => z[other] < z[cell]);
  const equal = known.filter(({ other }) => z[other] === z[cell] && other < cell).map(({ other }) => other);
  if (lower.length === 0) return equal.length === 0 ? cell : Math.min(...equal);
  // Elevations far apart may have equal falls after rounding, so at one distance elevation decides.
  const kinds = new Map<string, (typeof lower)[number]>();
  for (const step of lower) {
    const kind = offsets[step.k].map(Math.abs).join(' ');
    const held = kinds.get(kind);
    if (held === undefined || z[step.other] < z[held.other]) kinds.set(kind, step);
  }
  const slopes = [...kinds.values()].map(({ other, k }) => {
    const [dr, dc] = offsets[k];
    const distance = Math.sqrt((dr * metrics.southM[row]) ** 2 + (dc * metrics.eastM[row]) ** 2);
    return { other, k, slope: (z[cell] - z[other]) * (1 / distance) };
  });
  return slopes.sort((a, b) => b.slope - a.slope || a.k - b.k)[0].other;
}

/** Receivers of the whole grid in tiles of a size, by cell. */
function receiversIn(terrain: TerrainCase, size: number): number[] {
  const grid = gridOfCase(terrain);
  const all: number[] = [];
  for (const tile of tilesOf(terrain.width, terrain.height, size)) {
    const { to } = receiversOf(
      tileWindow(grid, tile, terrain.neighbours, terrain.madePits),
      receiverRoom(4000),
    );
    for (let r = 0; r < tile.height; r++) {
      for (let c = 0; c < tile.width; c++) {
        const cell = (tile.row + r) * terrain.width + tile.column + c;
        const found = to[(r + 1) * (tile.width + 2) + c + 1];
        all[cell] = found === voidMark || found === pitMark ? cell : cellAt(found, tile, shapeOf(grid));
      }
    }
  }
  return all;
}

describe('receivers', () => {
  it('are those of a plain slow search, for any tile size', () => {
    check(2000, terrainCases({ width: 9, height: 8 }), (terrain) => {
      const expected = terrain.z.map((z, cell) => (Number.isNaN(z) ? cell : slowReceiver(terrain, cell)));
      for (const size of [1, 3, 32]) expect(receiversIn(terrain, size)).toEqual(expected);
    });
  });

  it('fall to the steepest, not the lowest', () => {
    const terrain = terrainFromText('0 2 9 \n 9 5 9 \n 9 9 9');
    expect(receiversIn(terrain, 8)[4]).toBe(0);
    expect(receiversIn(terrainFromText('1 2 9 \n 9 5 9 \n 9 9 9'), 8)[4]).toBe(1);
  });

  it('follow true cell sizes', () => {
    const terrain = terrainFromText('9 1 9 \n 0.5 5 9 \n 9 9 9', { metrics: 'oblong' });
    expect(receiversIn(terrain, 8)[4]).toBe(1);
    expect(receiversIn({ ...terrain, metrics: 'square' }, 8)[4]).toBe(3);
  });

  it('lead over a flat to its first cell, the one pit', () => {
    const grid = gridOfCase(terrainFromText('4 4 4 \n 4 4 4'));
    const { pits, pitCount } = receiversOf(tileWindow(grid, tilesOf(3, 2, 8)[0], 8, []), receiverRoom(100));
    expect([...pits.subarray(0, pitCount)]).toEqual([6]);
  });
});

describe('the saddle test', () => {
  it('finds the cells whose lower neighbours form two or more arcs, a made pit one fewer', () => {
    check(2000, terrainCases({ width: 9, height: 8 }), (terrain) => {
      const grid = gridOfCase(terrain);
      const { neighbours, width, height, z, madePits } = terrain;
      const counts = arcCounts(neighbours);
      const tile = { column: 0, row: 0, width, height };
      const found = receiversOf(tileWindow(grid, tile, neighbours, madePits), receiverRoom(4000));
      const expected: string[] = [];
      z.forEach((own, cell) => {
        let mask = 0;
        placesAround(terrain, cell).forEach((other, k) => {
          if (other >= 0 && (z[other] < own || (z[other] === own && other < cell))) mask |= 1 << k;
        });
        if (counts[mask] >= (madePits.includes(cell) ? 1 : 2)) expected.push(`${cell} ${mask}`);
      });
      const saddles = [...found.saddles.subarray(0, found.saddleCount)];
      expect(saddles.map((at) => `${cellAt(at, tile, shapeOf(grid))} ${found.lower[at]}`)).toEqual(expected);
    });
  });
});
