import { describe, expect, it } from 'vitest';
import { cellsOfPole, distanceM, neighboursOf } from '../../src/core/cell-steps.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const text = '1 1 1 1 \n 1 1 1 1 \n 1 1 1 1';

describe('neighbours of a cell', () => {
  it('are those inside the grid, in row order', () => {
    const grid = gridOfCase(terrainFromText(text));
    expect(neighboursOf(grid, 8, 5)).toEqual([0, 1, 2, 4, 6, 8, 9, 10]);
    expect(neighboursOf(grid, 4, 5)).toEqual([1, 4, 6, 9]);
    expect(neighboursOf(grid, 8, 0)).toEqual([1, 4, 5]);
    expect(neighboursOf(grid, 4, 11)).toEqual([7, 10]);
  });

  it('lie across the seam where the grid wraps', () => {
    const grid = gridOfCase(terrainFromText(text, { wraps: true }));
    expect(neighboursOf(grid, 8, 4)).toEqual([3, 0, 1, 7, 5, 11, 8, 9]);
    expect(neighboursOf(grid, 4, 3)).toEqual([2, 0, 7]);
  });

  it('are the whole row where that lies on a pole', () => {
    const grid = gridOfCase(terrainFromText(text, { south: 'pole-row', metrics: 'geographic' }));
    expect(cellsOfPole(grid, 9)).toEqual([8, 9, 10, 11]);
    expect(cellsOfPole(grid, 5)).toEqual([]);
    expect(cellsOfPole(grid, 2)).toEqual([]);
  });
});

describe('distance between cells', () => {
  it("follows the cells' sizes", () => {
    const grid = gridOfCase(terrainFromText(text, { metrics: 'oblong' }));
    expect(distanceM(grid, 0, 3)).toBeCloseTo(4.5, 12);
    expect(distanceM(grid, 0, 9)).toBeCloseTo(Math.hypot(1.5, 1.4), 12);
    expect(distanceM(grid, 6, 6)).toBe(0);
  });

  it('is the short way round where the grid wraps', () => {
    const grid = gridOfCase(terrainFromText(text, { wraps: true }));
    expect(distanceM(grid, 0, 3)).toBe(1);
    expect(distanceM(grid, 0, 2)).toBe(2);
  });
});
