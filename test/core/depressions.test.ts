import { describe, expect, it } from 'vitest';
import { outermostOf } from '../../src/core/depressions.ts';
import { nowhere, outside } from '../../src/core/drainage.ts';
import { analysisOf, pondsOf } from './property/analysis.ts';
import { terrainFromText } from './terrain-from-text.ts';

/** Ponds of a profile from which water leaves in the last cell only: cells, spill elevation, parent. */
function ponds(text: string): [number[], number, number][] {
  const terrain = terrainFromText(text, { edges: 'closed' });
  const outlets = [{ cell: terrain.width - 1, levelM: Number.NEGATIVE_INFINITY }];
  return pondsOf(analysisOf({ ...terrain, outlets })).map(({ cells, spillM, parent }) => [
    [...cells],
    spillM,
    parent,
  ]);
}

// Expected ponds are read off the profiles by eye.
describe('the hierarchy of depressions', () => {
  it('is empty on a slope', () => {
    expect(ponds('4 3 3 2 1')).toEqual([]);
  });

  it('has a parent where two ponds meet below the way out', () => {
    expect(ponds('9 1 4 2 7 0')).toEqual([
      [[1], 4, 2],
      [[3], 4, 2],
      [[1, 2, 3], 7, -1],
    ]);
  });

  it('has one parent for three ponds that meet at one elevation', () => {
    expect(ponds('9 1 4 2 4 3 8 0')).toEqual([
      [[1], 4, 3],
      [[3], 4, 3],
      [[5], 4, 3],
      [[1, 2, 3, 4, 5], 8, -1],
    ]);
  });

  it('has no parent where two ponds meet at the elevation of the way out', () => {
    expect(ponds('9 1 4 2 4 0')).toEqual([
      [[1], 4, -1],
      [[3], 4, -1],
    ]);
  });

  it('hands children up where their parent would spill at its own birth', () => {
    expect(ponds('9 1 4 2 4 4 3 4 0')).toEqual([
      [[1], 4, -1],
      [[3], 4, -1],
      [[6], 4, -1],
    ]);
  });

  it('takes flats in without a pond of their own', () => {
    expect(ponds('9 4 4 1 4 4 7 0')).toEqual([[[1, 2, 3, 4, 5], 7, -1]]);
    expect(ponds('9 4 4 7 0')).toEqual([[[1, 2], 7, -1]]);
  });

  it('tells where a pond overflows and into what', () => {
    const terrain = terrainFromText('9 1 4 2 7 0', { edges: 'closed', outlets: [{ cell: 5, levelM: -1 }] });
    const { depressions, drainage } = analysisOf(terrain);
    const whole = 3;
    expect([...depressions.isPond]).toEqual([1, 1, 0, 1]);
    expect(drainage.tree.sillCell[depressions.pourSill[whole]]).toBe(4);
    expect([...depressions.intoLeaf]).toEqual([1, 0, outside, 2]);
    expect(depressions.pitLeaf[whole]).toBe(0);
  });

  it('knows no pond in ground without any way to an outlet', () => {
    const { depressions } = analysisOf(terrainFromText('3 1 3 2 3', { edges: 'closed' }));
    expect([...depressions.isPond]).toEqual([0, 0, 0]);
    expect(depressions.spillElevationM[2]).toBe(Number.POSITIVE_INFINITY);
    expect(depressions.intoLeaf[2]).toBe(nowhere);
  });
});

describe('the outermost of each', () => {
  it('is the last up the parents, itself without one', () => {
    expect([...outermostOf(Int32Array.of(3, 3, -1, 4, -1, 4))]).toEqual([4, 4, 2, 4, 4, 4]);
    expect([...outermostOf(new Int32Array(0))]).toEqual([]);
  });
});
