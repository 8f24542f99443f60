import { describe, expect, it } from 'vitest';
import { compensatedSum, nestedPonds } from './nested-ponds.ts';
import { gridFromText } from './sample-grids.ts';
import { thresholdLevels } from './threshold-levels.ts';
import { wetPieces } from './wet-pieces.ts';

const ground = Number.NEGATIVE_INFINITY;
const east = (cell: number, levelM = ground) => ({ neighbours: 4 as const, outlets: [{ cell, levelM }] });

// Expected ponds are read off the profiles by eye.
describe('ponds of a small grid by their definition', () => {
  it('finds none on a slope, on level ground and where only the rim is low', () => {
    expect(nestedPonds(gridFromText('4 3 2 1', east(3)))).toEqual([]);
    expect(nestedPonds(gridFromText('2 2 2 \n 2 2 2 \n 2 2 2'))).toEqual([]);
    expect(nestedPonds(gridFromText('1 5 5 \n 5 5 5 \n 5 5 1'))).toEqual([]);
  });

  it('finds one pit with its capacity', () => {
    const ponds = nestedPonds(gridFromText('5 5 5 5 \n 5 1 2 5 \n 5 5 5 3'));
    expect(ponds).toEqual([{ cells: [5, 6], spillM: 3, pitM: 1, capacityM3: 3, parent: -1 }]);
  });

  it('multiplies depths by the areas of their rows', () => {
    const grid = gridFromText('5 5 5 \n 5 1 5 \n 5 2 5 \n 5 5 5');
    expect(nestedPonds(grid, [1, 10, 100, 1000])[0].capacityM3).toBe(4 * 10 + 3 * 100);
  });

  it('finds two ponds that meet below the way out, and the one that holds both', () => {
    const ponds = nestedPonds(gridFromText('9 1 4 2 7 0', east(5)));
    expect(ponds).toEqual([
      { cells: [1], spillM: 4, pitM: 1, capacityM3: 3, parent: 2 },
      { cells: [3], spillM: 4, pitM: 2, capacityM3: 2, parent: 2 },
      { cells: [1, 2, 3], spillM: 7, pitM: 1, capacityM3: 6 + 3 + 5, parent: -1 },
    ]);
  });

  it('finds no pond that holds both where they meet at the elevation of the way out', () => {
    const ponds = nestedPonds(gridFromText('9 1 4 2 4 0', east(5)));
    expect(ponds.map(({ cells, spillM, parent }) => ({ cells, spillM, parent }))).toEqual([
      { cells: [1], spillM: 4, parent: -1 },
      { cells: [3], spillM: 4, parent: -1 },
    ]);
  });

  it('lets three ponds that meet at one elevation have one parent', () => {
    const ponds = nestedPonds(gridFromText('9 1 4 2 4 3 8 0', east(7)));
    expect(ponds.map((pond) => [pond.cells.length, pond.spillM, pond.parent])).toEqual([
      [1, 4, 3],
      [1, 4, 3],
      [1, 4, 3],
      [5, 8, -1],
    ]);
  });

  it('takes a flat between two pits for their rim, and a flat beside one pit for its rim alone', () => {
    const between = nestedPonds(gridFromText('9 1 4 4 2 7 0', east(6)));
    expect(between.map((pond) => [pond.cells, pond.spillM])).toEqual([
      [[1], 4],
      [[4], 4],
      [[1, 2, 3, 4], 7],
    ]);
    const terrace = nestedPonds(gridFromText('9 1 4 4 7 0', east(5)));
    expect(terrace.map((pond) => [pond.cells, pond.spillM])).toEqual([[[1, 2, 3], 7]]);
  });

  it('lets a pit that spills into ground which already drains have no parent', () => {
    const ponds = nestedPonds(gridFromText('9 1 6 3 4 0', east(5)));
    expect(ponds.map((pond) => [pond.cells, pond.spillM, pond.parent])).toEqual([
      [[3], 4, -1],
      [[1], 6, -1],
    ]);
  });

  it('follows the level of the water outside, and knows no pond where there is no outlet', () => {
    const held = nestedPonds(gridFromText('9 1 2', east(2, 5)));
    expect(held).toEqual([{ cells: [1, 2], spillM: 5, pitM: 1, capacityM3: 7, parent: -1 }]);
    expect(nestedPonds(gridFromText('9 1 2', { outlets: [] }))).toEqual([]);
    expect(nestedPonds(gridFromText('9 3 1 3 9 . 0', east(6)))).toEqual([]);
  });

  it('joins pits at corners with eight neighbours only, and across the seam where the grid wraps', () => {
    const text = '9 9 9 9 \n 9 1 8 9 \n 9 8 2 9 \n 9 9 9 9';
    const spills = (neighbours: 4 | 8) =>
      nestedPonds(gridFromText(text, { neighbours })).map((p) => p.spillM);
    expect(spills(8)).toEqual([9]);
    expect(spills(4)).toEqual([8, 8, 9]);
    const wrapped = nestedPonds(gridFromText('1 9 0 9 2', { ...east(2), wraps: true }));
    expect(wrapped.map((pond) => [pond.cells, pond.spillM])).toEqual([[[0, 4], 9]]);
  });

  it('has as outermost ones the connected pieces of wet ground, also where two meet at their spill elevation', () => {
    const grid = gridFromText('9 1 4 2 7 0 8 3 8 0', east(9));
    const outermost = nestedPonds(grid).filter((pond) => pond.parent === -1);
    expect(outermost.map((pond) => pond.cells)).toEqual([[1, 2, 3, 4, 5], [7]]);
    expect(wetPieces(grid, thresholdLevels(grid))).toEqual(outermost.map((pond) => pond.cells));
  });

  it('sums without dropping small parts', () => {
    expect(compensatedSum([1e30, 1, -1e30, 1])).toBe(2);
  });
});
