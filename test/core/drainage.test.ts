import { describe, expect, it } from 'vitest';
import { nowhere, outside } from '../../src/core/drainage.ts';
import { thresholdLevels } from './oracles/threshold-levels.ts';
import { analysisOf } from './property/analysis.ts';
import { check } from './property/check.ts';
import { oracleGrid } from './property/oracle-grid.ts';
import { terrainCases } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const ground = Number.NEGATIVE_INFINITY;

describe('drainage', () => {
  it('leads from leaf to leaf over the lowest sills to the outlet', () => {
    const terrain = terrainFromText('9 1 5 2 4 0', {
      edges: 'closed',
      outlets: [{ cell: 5, levelM: ground }],
    });
    const { drainage } = analysisOf(terrain);
    expect([...drainage.levelM]).toEqual([5, 4, 0]);
    expect([...drainage.towards]).toEqual([1, 2, outside]);
    expect([...drainage.order]).toEqual([2, 1, 0]);
    expect([...drainage.sill].map((sill) => drainage.tree.sillCell[sill])).toEqual([2, 4, 5]);
  });

  it('knows leaves without any way', () => {
    const terrain = terrainFromText('1 . 7 2', { edges: 'closed', outlets: [{ cell: 0, levelM: ground }] });
    const { drainage } = analysisOf(terrain);
    expect([...drainage.levelM]).toEqual([1, Number.POSITIVE_INFINITY]);
    expect([...drainage.towards]).toEqual([outside, nowhere]);
    expect([...drainage.sill]).toEqual([0, -1]);
    expect([...drainage.order]).toEqual([0]);
  });

  it('gives each leaf the level of its pit, after the leaf that it runs into', () => {
    check(2000, terrainCases({ width: 9, height: 8 }), (terrain) => {
      const { survey, drainage } = analysisOf(terrain);
      const level = thresholdLevels(oracleGrid(terrain));
      const place = new Map([...drainage.order].map((leaf, i) => [leaf, i]));
      for (let leaf = 0; leaf < survey.leaves; leaf++) {
        expect(drainage.levelM[leaf]).toBe(Math.fround(level[survey.pitCell[leaf]]));
        const into = drainage.towards[leaf];
        expect(place.has(leaf)).toBe(into !== nowhere);
        if (into < 0) continue;
        expect(place.get(into)).toBeLessThan(place.get(leaf) ?? -1);
        const sill = drainage.sill[leaf];
        const ends = [drainage.tree.sillLeaf[sill], drainage.tree.otherLeaf[sill]].sort((a, b) => a - b);
        expect(ends).toEqual([leaf, into].sort((a, b) => a - b));
        expect(drainage.levelM[leaf]).toBe(Math.max(drainage.levelM[into], drainage.tree.elevationM[sill]));
      }
    });
  });
});
