import { describe, expect, it } from 'vitest';
import { pondOutlines } from '../../../src/core/pond-outlines.ts';
import { cellsInside, isConnected, ringArea, unitSteps } from '../ring-checks.ts';
import { analysisOf, pondsOf } from './analysis.ts';
import { check } from './check.ts';
import { terrainCases } from './terrain-case.ts';

describe.each([false, true])('outlines of ponds of random grids, nested ones written: %s', (nested) => {
  it('hold exactly the cells of their pond, turn the right way and never touch themselves', () => {
    check(2000, terrainCases({ width: 12, height: 11 }), (terrain) => {
      const found = analysisOf(terrain);
      const { grid, survey, drainage, depressions } = found;
      const { width, height } = terrain;
      const ponds = pondsOf(found).filter(({ parent }) => nested || parent === -1);
      const kept = new Uint8Array(depressions.parent.length);
      for (const { node } of ponds) kept[node] = 1;
      const outlines = [...pondOutlines(grid, survey, drainage, depressions, kept, { nested })];
      expect(outlines.map(({ node }) => node).sort((a, b) => a - b)).toEqual(
        ponds.map(({ node }) => node).sort((a, b) => a - b),
      );
      const done = new Set<number>();
      for (const { node, polygons } of outlines) {
        expect(done.has(depressions.parent[node])).toBe(false);
        done.add(node);
        const inPolygons = polygons.flatMap(({ outer, holes }) => {
          const area = ringArea(outer, width);
          expect(area).toBeGreaterThan(0);
          let left = area;
          const inOuter = new Set(cellsInside([outer], width, height));
          for (const hole of holes) {
            expect(ringArea(hole, width)).toBeLessThan(0);
            left += ringArea(hole, width);
            expect(cellsInside([hole], width, height).every((cell) => inOuter.has(cell))).toBe(true);
          }
          for (const ring of [outer, ...holes]) {
            const vertices = unitSteps(ring, width);
            expect(new Set(vertices).size).toBe(vertices.length);
          }
          const cells = cellsInside([outer, ...holes], width, height);
          expect(cells.length).toBe(left);
          expect(isConnected(cells, width)).toBe(true);
          return cells;
        });
        expect(inPolygons.sort((a, b) => a - b)).toEqual(ponds.find((pond) => pond.node === node)?.cells);
      }
    });
  });
});

it('a cut column parts every outline and leaves the cells as they were', () => {
  check(1000, terrainCases({ width: 10, height: 8 }), (terrain) => {
    const found = analysisOf(terrain);
    const { grid, survey, drainage, depressions } = found;
    const { width, height } = terrain;
    const cutColumn = 1 + (height % width);
    for (const nested of [false, true]) {
      const ponds = pondsOf(found).filter(({ parent }) => nested || parent === -1);
      const kept = new Uint8Array(depressions.parent.length);
      for (const { node } of ponds) kept[node] = 1;
      const outlines = pondOutlines(grid, survey, drainage, depressions, kept, {
        nested,
        columns: { source: Int32Array.from({ length: width }, (_, column) => column), cut: cutColumn },
      });
      for (const { node, polygons } of outlines) {
        const cells = polygons.flatMap(({ outer, holes }) => {
          const columns = outer.map((vertex) => vertex % (width + 1));
          expect(Math.max(...columns) <= cutColumn || Math.min(...columns) >= cutColumn).toBe(true);
          return cellsInside([outer, ...holes], width, height);
        });
        expect(cells.sort((a, b) => a - b)).toEqual(ponds.find((pond) => pond.node === node)?.cells);
      }
    }
  });
});
