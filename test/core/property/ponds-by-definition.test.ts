import { describe, expect, it } from 'vitest';
import { nestedPonds } from '../oracles/nested-ponds.ts';
import { sweptLevels } from '../oracles/swept-levels.ts';
import { thresholdLevels } from '../oracles/threshold-levels.ts';
import { wetPieces } from '../oracles/wet-pieces.ts';
import { analysisOf, pondsOf } from './analysis.ts';
import { check } from './check.ts';
import { oracleGrid } from './oracle-grid.ts';
import { terrainCases } from './terrain-case.ts';

const cases = terrainCases({ width: 9, height: 8 });

describe('on random small grids of every kind', () => {
  it('brim levels are those of threshold connectivity and of sweeps to a fixed point', () => {
    check(2500, cases, (terrain) => {
      const small = oracleGrid(terrain);
      const threshold = thresholdLevels(small);
      const level = Array.from(threshold, (value) =>
        value === Number.POSITIVE_INFINITY ? Number.NaN : value,
      );
      expect([...analysisOf(terrain).levelM]).toEqual(level);
      expect([...sweptLevels(small)]).toEqual([...threshold]);
    });
  });

  it('outermost ponds are the connected pieces of wet ground', () => {
    check(2500, cases, (terrain) => {
      const found = analysisOf(terrain);
      const outermost = pondsOf(found).filter(({ parent }) => parent === -1);
      const pieces = outermost.map(({ cells }) => cells).sort((a, b) => a[0] - b[0]);
      const small = oracleGrid(terrain);
      expect(pieces).toEqual(wetPieces(small, thresholdLevels(small)));
    });
  });

  it('all ponds, nested ones too, are those of the definition, with their sizes', () => {
    check(2500, cases, (terrain) => {
      const found = analysisOf(terrain);
      const { areaM2, areaBoundM2 } = found.grid.metrics;
      const expected = nestedPonds(oracleGrid(terrain), areaM2);
      const ponds = pondsOf(found);
      expect(ponds.map(({ cells, spillM, pitM, parent }) => ({ cells, spillM, pitM, parent }))).toEqual(
        expected.map(({ cells, spillM, pitM, parent }) => ({ cells, spillM, pitM, parent })),
      );
      ponds.forEach(({ node, cells, capacityM3, spillM, pitM }, i) => {
        expect(found.measures.cells[node]).toBe(cells.length);
        const area = cells.reduce((sum, cell) => sum + areaM2[Math.floor(cell / terrain.width)], 0);
        // Each term is rounded to 2⁻⁴³ of the bound or finer (see exact-sum.ts); plain rounding comes on top.
        const rounding = cells.length * 2 ** -43 * areaBoundM2;
        expect(Math.abs(found.measures.areaM2[node] - area)).toBeLessThanOrEqual(rounding + 1e-14 * area);
        const room = 2 * rounding * (spillM - pitM) + 1e-13 * expected[i].capacityM3;
        expect(Math.abs(capacityM3 - expected[i].capacityM3)).toBeLessThanOrEqual(room);
      });
    });
  });

  it('the capacity of outermost ponds is the sum over cells of the depth of water', () => {
    check(2500, cases, (terrain) => {
      const found = analysisOf(terrain);
      const { elevationM, metrics, width } = found.grid;
      let whole = 0;
      found.levelM.forEach((level, cell) => {
        if (level > elevationM[cell])
          whole += (level - elevationM[cell]) * metrics.areaM2[Math.floor(cell / width)];
      });
      const outermost = pondsOf(found).filter(({ parent }) => parent === -1);
      const capacity = outermost.reduce((sum, pond) => sum + pond.capacityM3, 0);
      expect(Math.abs(capacity - whole)).toBeLessThanOrEqual(1e-11 * whole);
    });
  });
});
