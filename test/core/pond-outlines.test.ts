import { describe, expect, it } from 'vitest';
import { type OutlineColumns, pondOfCells, pondOutlines } from '../../src/core/pond-outlines.ts';
import { analysisOf, pondsOf } from './property/analysis.ts';
import type { TerrainCase } from './property/terrain-case.ts';
import { cellsInside, ringArea } from './ring-checks.ts';
import { terrainFromText } from './terrain-from-text.ts';

/** Areas of the rings of each pond's polygons, ponds in the order written. */
function outlines(terrain: TerrainCase, options: { nested: boolean; columns?: OutlineColumns }) {
  const found = analysisOf(terrain);
  const { grid, survey, drainage, depressions } = found;
  const kept = new Uint8Array(depressions.parent.length);
  for (const { node, parent } of pondsOf(found)) if (options.nested || parent < 0) kept[node] = 1;
  return [...pondOutlines(grid, survey, drainage, depressions, kept, options)].map(({ polygons }) =>
    polygons.map(({ outer, holes }) => ({
      cells: cellsInside([outer, ...holes], terrain.width, terrain.height),
      areas: [outer, ...holes].map((ring) => ringArea(ring, terrain.width)),
    })),
  );
}

const island = terrainFromText('9 9 9 9 9 \n 9 1 1 1 9 \n 9 1 8 1 9 \n 9 1 1 1 9 \n 9 9 9 9 7');

describe('outlines of ponds', () => {
  it('have dry islands as holes', () => {
    expect(outlines(island, { nested: false })).toEqual([
      [{ cells: [6, 7, 8, 11, 13, 16, 17, 18], areas: [9, -1] }],
    ]);
  });

  it('of nested ponds come before those of the ponds that hold them', () => {
    const terrain = terrainFromText('9 9 9 9 9 \n 9 1 5 2 9 \n 9 9 9 9 9');
    const written = outlines(terrain, { nested: true }).map((polygons) =>
      polygons.flatMap(({ cells }) => cells),
    );
    expect(written.slice(0, 2).sort((a, b) => a[0] - b[0])).toEqual([[6], [8]]);
    expect(written.slice(2)).toEqual([[6, 7, 8]]);
    expect(outlines(terrain, { nested: false })).toEqual([[{ cells: [6, 7, 8], areas: [3] }]]);
  });

  it('are cut at the seam of a wrapped grid and at a given column', () => {
    const ring = terrainFromText('9 9 9 9 9 \n 1 1 9 1 1 \n 9 9 9 9 9', { wraps: true });
    expect(outlines(ring, { nested: false })[0].map(({ cells }) => cells)).toEqual([
      [5, 6],
      [8, 9],
    ]);
    const flat = terrainFromText('9 9 9 9 9 \n 9 1 1 1 9 \n 9 9 9 9 9');
    for (const nested of [false, true]) {
      expect(
        outlines(flat, {
          nested,
          columns: { source: Int32Array.of(0, 1, 2, 3, 4).slice(0, flat.width), cut: 2 },
        })[0].map(({ cells }) => cells),
      ).toEqual([[6], [7, 8]]);
    }
  });
});

describe('the pond of each cell', () => {
  it('is the outermost or the smallest that wets it, none on dry ground', () => {
    const { grid, survey, drainage, depressions } = analysisOf(
      terrainFromText('9 9 9 9 9 . \n 9 1 5 2 9 9 \n 9 9 9 9 9 9'),
    );
    const row = (smallest: boolean): number[] => [
      ...pondOfCells(grid, survey, drainage, depressions, smallest).subarray(6, 12),
    ];
    const [whole] = [...depressions.parent.keys()].filter((node) => node >= depressions.leaves);
    expect(row(false)).toEqual([-1, whole, whole, whole, -1, -1]);
    const [, left, middle, right] = row(true);
    expect([depressions.parent[left], middle, depressions.parent[right]]).toEqual([whole, whole, whole]);
    expect(left).not.toBe(right);
  });
});
