import { describe, expect, it } from 'vitest';
import {
  noOutletCells,
  type OutletRules,
  outletPits,
  outletSills,
  outsideCell,
  usualOutlets,
} from '../../src/core/outlets.ts';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { gridOfCase, type TerrainCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

/** Cell and elevation of each way out. */
function waysOut(terrain: TerrainCase, rules: Partial<OutletRules>): [number, number][] {
  const grid = gridOfCase(terrain);
  const survey = surveyOf(grid, { neighbours: terrain.neighbours });
  const sills = outletSills(grid, survey, { ...usualOutlets, ...rules });
  return [...sills.sillCell].map((cell, i) => {
    expect(sills.otherCell[i]).toBe(outsideCell);
    expect(sills.otherLeaf[i]).toBe(survey.leaves);
    expect(sills.sillLeaf[i]).toBe(survey.leaf[cell]);
    return [cell, sills.elevationM[i]];
  });
}

const cells = (...list: [number, number][]) => ({
  cell: Float64Array.from(list, ([cell]) => cell),
  levelM: Float32Array.from(list, ([, levelM]) => levelM),
});

describe('ways out', () => {
  const bowl = terrainFromText('9 9 9 \n 9 1 9 \n 9 9 6');

  it('lead over the lowest rim cell of each catchment where edges are open', () => {
    expect(waysOut(bowl, {})).toEqual([[8, 6]]);
    expect(waysOut(bowl, { edges: 'closed' })).toEqual([]);
  });

  it('lead into voids as the rules say', () => {
    const inner = terrainFromText('9 9 9 9 9 \n 9 . 3 4 9 \n 9 9 9 9 9');
    const onRim = terrainFromText('9 9 9 9 9 \n . 5 3 4 9 \n 9 9 9 9 9');
    const lowest = (terrain: TerrainCase, rules: Partial<OutletRules>): number =>
      Math.min(...waysOut(terrain, rules).map(([, elevationM]) => elevationM));
    expect(lowest(inner, { voids: 'rim' })).toBe(9);
    expect(lowest(inner, { voids: 'walls' })).toBe(9);
    expect(lowest(inner, { voids: 'all' })).toBe(3);
    expect(lowest(inner, { voids: 'all', edges: 'closed' })).toBe(3);
    expect(lowest(onRim, { voids: 'rim' })).toBe(5);
    expect(lowest(onRim, { voids: 'walls' })).toBe(9);
    expect(waysOut(onRim, { voids: 'rim', edges: 'closed' })).toEqual([]);
  });

  it('lead into a gap between files only where it is declared open', () => {
    const gap = terrainFromText('9 9 9 \n 9 3 9 \n . . . \n 9 9 9', {
      gap: { column: 0, row: 2, width: 3, height: 1 },
    });
    expect(waysOut(gap, { edges: 'closed', gaps: 'walls' })).toEqual([]);
    expect(waysOut(gap, { edges: 'closed', gaps: 'open' })).toEqual([
      [4, 3],
      [9, 9],
    ]);
    expect(waysOut(gap, { edges: 'open', gaps: 'walls' }).map(([, elevationM]) => elevationM)).toEqual([
      9, 9,
    ]);
  });

  it('lead out of named cells at their level or the ground, whichever is higher, the lowest of each catchment', () => {
    const named = (...list: [number, number][]) => waysOut(bowl, { edges: 'closed', cells: cells(...list) });
    expect(named([4, -5])).toEqual([[4, 1]]);
    expect(named([4, 3])).toEqual([[4, 3]]);
    expect(named([4, 8], [8, Number.NEGATIVE_INFINITY])).toEqual([[8, 6]]);
    expect(waysOut(terrainFromText('1 . 2'), { edges: 'closed', cells: cells([1, 0]) })).toEqual([]);
  });

  it('name nothing unless told', () => {
    expect([...noOutletCells.cell]).toEqual([]);
  });
});

describe('outlet cells that must be pits', () => {
  it('are those that touch ground which is no outlet', () => {
    const grid = gridOfCase(terrainFromText('1 1 1 1 \n 1 1 1 1 \n 1 1 1 1 \n 2 2 2 2'));
    const reach = Array.from({ length: 12 }, (_, cell): [number, number] => [cell, 0]);
    expect([...outletPits(grid, cells(...reach))]).toEqual([8, 9, 10, 11]);
  });

  it('look across the seam of a wrapped grid', () => {
    const text = '1 1 1 \n 1 1 1 \n 1 1 1';
    const column: [number, number][] = [
      [0, 0],
      [1, 0],
      [3, 0],
      [4, 0],
      [6, 0],
      [7, 0],
    ];
    const plain = gridOfCase(terrainFromText(text));
    expect([...outletPits(plain, cells(...column))]).toEqual([1, 4, 7]);
    const wrapped = gridOfCase(terrainFromText(text, { wraps: true }));
    expect([...outletPits(wrapped, cells(...column))]).toEqual([0, 1, 3, 4, 6, 7]);
  });
});
