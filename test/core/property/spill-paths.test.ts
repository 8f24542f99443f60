import { describe, expect, it } from 'vitest';
import { type SpillPath, spillPath } from '../../../src/core/spill-path.ts';
import { noPond, spillsInto } from '../../../src/core/spills-into.ts';
import { leavingLevels, touching } from '../oracles/small-grid.ts';
import { type Analysis, analysisOf, pondsOf } from './analysis.ts';
import { check } from './check.ts';
import { around, isOnRim, oracleGrid } from './oracle-grid.ts';
import { type TerrainCase, terrainCases } from './terrain-case.ts';

const cases = terrainCases({ width: 7, height: 6 });

function pathFrom({ grid, survey, drainage, depressions }: Analysis, cell: number): SpillPath {
  return spillPath(grid, survey, drainage, depressions, cell);
}

function groundOf(terrain: TerrainCase): number[] {
  return [...terrain.z.keys()].filter((cell) => !Number.isNaN(terrain.z[cell]));
}

describe('the spill path from every cell of random small grids', () => {
  it('goes from neighbour to neighbour, never uphill in water surface, to an outlet', () => {
    check(2000, cases, (terrain) => {
      const found = analysisOf(terrain);
      const small = oracleGrid(terrain);
      const touch = touching(small);
      const leaving = leavingLevels(small);
      const surface = (cell: number): number => {
        const level = found.levelM[cell];
        return Number.isNaN(level) ? terrain.z[cell] : level;
      };
      for (const start of groundOf(terrain)) {
        const { legs, end } = pathFrom(found, start);
        const way = legs.flatMap(({ cells }, i) => (i === 0 ? cells : cells.slice(1)));
        if (way.length === 0) way.push(start);
        expect(way[0]).toBe(start);
        legs.slice(1).forEach((leg, i) => {
          expect(leg.cells[0]).toBe(legs[i].cells[legs[i].cells.length - 1]);
        });
        for (let i = 1; i < way.length; i++) {
          expect(touch[way[i - 1]]).toContain(way[i]);
          expect(surface(way[i])).toBeLessThanOrEqual(surface(way[i - 1]));
        }
        const last = way[way.length - 1];
        expect(end).toBe(Number.isNaN(found.levelM[start]) ? 'no-way' : 'outlet');
        if (end === 'outlet') expect(leaving[last]).toBeLessThanOrEqual(surface(last));
        else expect(isPit(terrain, last)).toBe(true);
      }
    });
  });

  it('keeps pond legs inside the water of their pond and land legs out of any', () => {
    check(2000, cases, (terrain) => {
      const found = analysisOf(terrain);
      const ponds = new Map(pondsOf(found).map((pond) => [pond.node, new Set(pond.cells)]));
      const isWet = (cell: number): boolean => found.levelM[cell] > terrain.z[cell];
      for (const start of groundOf(terrain)) {
        const { legs } = pathFrom(found, start);
        legs.forEach(({ kind, pond, cells, fromElevationM, toElevationM }) => {
          const inner = cells.slice(1, -1);
          if (kind === 'land') {
            expect(pond).toBe(-1);
            expect(inner.filter(isWet)).toEqual([]);
            return;
          }
          const water = ponds.get(pond) ?? new Set();
          expect([cells[0], ...inner].filter((cell) => !water.has(cell))).toEqual([]);
          expect(fromElevationM).toBe(toElevationM);
        });
      }
    });
  });
});

it('each outermost pond spills into the next kept pond on its spill path', () => {
  check(2000, cases, (terrain) => {
    const found = analysisOf(terrain);
    const { survey, drainage, depressions } = found;
    const outermost = pondsOf(found).filter(({ parent }) => parent === -1);
    const kept = new Uint8Array(depressions.parent.length);
    for (const { node, cells } of outermost) kept[node] = (cells[0] + cells.length) % 3 === 0 ? 0 : 1;
    const into = spillsInto(survey, drainage, depressions, kept);
    for (const { node, cells } of outermost) {
      const next = pathFrom(found, cells[0]).legs.filter(
        ({ pond }) => pond >= 0 && pond !== node && kept[pond] === 1,
      );
      expect(into[node]).toBe(next.length === 0 ? noPond : next[0].pond);
    }
  });
});

describe('what runs to a pond', () => {
  it('is the ground whose spill path passes through it', () => {
    check(1000, cases, (terrain) => {
      const found = analysisOf(terrain);
      const { measures, grid, depressions } = found;
      const areaOf = (cell: number): number => grid.metrics.areaM2[Math.floor(cell / terrain.width)];
      const contributing = new Map<number, number>();
      const own = new Map<number, number>();
      for (const start of groundOf(terrain)) {
        const ponds = pathFrom(found, start)
          .legs.filter(({ kind }) => kind === 'pond')
          .map(({ pond }) => pond);
        for (const pond of ponds) contributing.set(pond, (contributing.get(pond) ?? 0) + areaOf(start));
        if (ponds.length > 0) own.set(ponds[0], (own.get(ponds[0]) ?? 0) + areaOf(start));
      }
      const whole = groundOf(terrain).reduce((sum, cell) => sum + areaOf(cell), 0);
      for (const { node } of pondsOf(found).filter(({ parent }) => parent === -1)) {
        expect(depressions.parent[node]).toBe(-1);
        const near = (a: number, b: number): void =>
          expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-11 * whole);
        near(measures.contributingAreaM2[node], contributing.get(node) ?? 0);
        near(measures.catchmentAreaM2[node], own.get(node) ?? 0);
      }
    });
  });

  it('touches the edge exactly where a cell of it lies on the rim or beside a void', () => {
    check(1000, cases, (terrain) => {
      const found = analysisOf(terrain);
      const touched = new Set<number>();
      const atEdge = (cell: number): boolean => isOnRim(terrain, cell) || besideVoid(terrain, cell);
      for (const start of groundOf(terrain).filter(atEdge)) {
        for (const { pond } of pathFrom(found, start).legs) touched.add(pond);
      }
      for (const { node } of pondsOf(found).filter(({ parent }) => parent === -1)) {
        expect(found.measures.touchesEdge[node]).toBe(touched.has(node) ? 1 : 0);
      }
    });
  });
});

function besideVoid(terrain: TerrainCase, cell: number): boolean {
  const { z, neighbours } = terrain;
  return around(terrain, cell, neighbours).some((other) => Number.isNaN(z[other]));
}

function isPit({ z, madePits, ...terrain }: TerrainCase, cell: number): boolean {
  const lower = around(terrain, cell, terrain.neighbours).some((other) => z[other] < z[cell]);
  return !lower || madePits.includes(cell);
}
