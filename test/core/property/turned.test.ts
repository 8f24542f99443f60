import { describe, expect, it } from 'vitest';
import type { CellRect } from '../../../src/core/grid.ts';
import { analysisOf, type FoundPond, pondsOf } from './analysis.ts';
import { check } from './check.ts';
import { cellsOfGap, type TerrainCase, terrainCases } from './terrain-case.ts';

/** Where each cell of a turned grid lies in the original one. */
interface Turn {
  readonly terrain: TerrainCase;
  readonly original: (cell: number) => number;
}

function turned(
  terrain: TerrainCase,
  width: number,
  height: number,
  original: (cell: number) => number,
): Turn {
  const cells = Array.from({ length: width * height }, (_, cell) => cell);
  const place = new Map(cells.map((cell) => [original(cell), cell]));
  const moved = (cell: number): number => place.get(cell) ?? -1;
  const outlets = terrain.outlets.map(({ cell, levelM }) => ({ cell: moved(cell), levelM }));
  const gap = cellsOfGap(terrain.gap, terrain.width).map(moved);
  return {
    terrain: {
      ...terrain,
      gap: gap.length === 0 ? null : rectangleOf(gap, width),
      width,
      height,
      z: cells.map((cell) => terrain.z[original(cell)]),
      outlets: outlets.sort((a, b) => a.cell - b.cell),
      madePits: terrain.madePits.map(moved).sort((a, b) => a - b),
    },
    original,
  };
}

/** The rectangle that cells fill. */
function rectangleOf(cells: readonly number[], width: number): CellRect {
  const columns = cells.map((cell) => cell % width);
  const rows = cells.map((cell) => Math.floor(cell / width));
  const [column, row] = [Math.min(...columns), Math.min(...rows)];
  return { column, row, width: Math.max(...columns) - column + 1, height: Math.max(...rows) - row + 1 };
}

const turns: Record<string, (terrain: TerrainCase) => Turn> = {
  'mirrored left to right': (terrain) => {
    const { width, height } = terrain;
    return turned(terrain, width, height, (cell) => cell - (cell % width) + width - 1 - (cell % width));
  },
  'mirrored top to bottom': (terrain) => {
    const { width, height, north, south } = terrain;
    const sides = { ...terrain, north: south, south: north };
    return turned(
      sides,
      width,
      height,
      (cell) => (height - 1 - Math.floor(cell / width)) * width + (cell % width),
    );
  },
  transposed: (terrain) => {
    const { width, height } = terrain;
    return turned(terrain, height, width, (cell) => (cell % height) * width + Math.floor(cell / height));
  },
};

/** Ponds with their cells in the original grid, in an order that no turn changes; parents as their cells. */
function comparable(ponds: readonly FoundPond[], original: (cell: number) => number) {
  const cellsOf = (pond: FoundPond): string =>
    pond.cells
      .map(original)
      .sort((a, b) => a - b)
      .join(' ');
  return ponds
    .map((pond) => ({
      cells: cellsOf(pond),
      spillM: pond.spillM,
      pitM: pond.pitM,
      parent: pond.parent < 0 ? 'none' : cellsOf(ponds[pond.parent]),
      capacityM3: pond.capacityM3,
    }))
    .sort((a, b) => a.spillM - b.spillM || (a.cells < b.cells ? -1 : 1));
}

function expectSamePonds(terrain: TerrainCase, turn: Turn): void {
  const before = comparable(pondsOf(analysisOf(terrain)), (cell) => cell);
  const after = comparable(pondsOf(analysisOf(turn.terrain)), turn.original);
  const withoutCapacity = ({ capacityM3: _, ...pond }: (typeof before)[number]) => pond;
  expect(after.map(withoutCapacity)).toEqual(before.map(withoutCapacity));
  after.forEach(({ capacityM3 }, i) => {
    expect(Math.abs(capacityM3 - before[i].capacityM3)).toBeLessThanOrEqual(1e-12 * before[i].capacityM3);
  });
}

describe.each(Object.keys(turns))('a terrain %s', (name) => {
  it('has the same ponds', () => {
    check(2000, terrainCases({ width: 12, height: 11 }, { plain: true }), (terrain) => {
      expectSamePonds(terrain, turns[name](terrain));
    });
  });
});

it('a wrapped terrain has the same ponds wherever its seam lies', () => {
  const cases = terrainCases({ width: 12, height: 9 }).filter(({ wraps, gap }) => wraps && gap === null);
  check(2000, cases, (terrain) => {
    const { width, height } = terrain;
    const shift = 1 + (height % (width - 1));
    const turn = turned(
      terrain,
      width,
      height,
      (cell) => cell - (cell % width) + (((cell % width) + shift) % width),
    );
    expectSamePonds(terrain, turn);
  });
});

it('the turned cases are real grids', () => {
  const turn = turns.transposed({
    width: 3,
    height: 2,
    z: [1, 2, 3, 4, 5, 6],
    neighbours: 8,
    wraps: false,
    north: 'beyond',
    south: 'beyond',
    edges: 'open',
    voids: 'rim',
    gap: { column: 1, row: 0, width: 2, height: 1 },
    gaps: 'walls',
    edgeLevelM: Number.NEGATIVE_INFINITY,
    voidLevelM: Number.NEGATIVE_INFINITY,
    outlets: [{ cell: 2, levelM: 0 }],
    madePits: [3],
    metrics: 'square',
  });
  expect(turn.terrain.z).toEqual([1, 4, 2, 5, 3, 6]);
  expect(turn.terrain.outlets[0].cell).toBe(4);
  expect(turn.terrain.madePits).toEqual([1]);
  expect(turn.terrain.gap).toEqual({ column: 0, row: 1, width: 1, height: 2 });
});
