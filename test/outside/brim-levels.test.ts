import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { pondOfCells } from '../../src/core/index.ts';
import { deepestOnly, filled, outermost, realGrid } from './filled.ts';

/**
 * Source: greyscale morphological reconstruction by erosion (Vincent 1993) in scikit-image, minimum spanning tree of
 * the grid graph (Hu 1961) in scipy.sparse.csgraph, and labelling in scipy.ndimage, on real open elevation; recorded
 * in test/outside/recorded by test/outside/oracles and recomputed by `npm run oracles`.
 */
interface Recorded {
  readonly levelSha256: string;
  readonly wetCells: number;
  readonly depthSumM: number;
  readonly capacityM3: number | null;
  readonly rowDepthSumsM: readonly number[] | null;
  readonly sample: readonly (readonly [cell: number, levelM: number])[];
  readonly ponds: {
    readonly count: number;
    readonly sha256: string;
    readonly largest: readonly { firstCell: number; cells: number; levelM: number; depthSumM: number }[];
  };
}

const cases = (['olinda', 'volcano', 'etopo60'] as const).flatMap((name) =>
  ([8, 4] as const).map((neighbours) => ({ name, neighbours })),
);

describe.each(cases)('$name with $neighbours neighbours', async ({ name, neighbours }) => {
  const path = new URL(`recorded/${name}-${neighbours}.json`, import.meta.url);
  const recorded: Recorded = JSON.parse(readFileSync(path, 'utf8'));
  const grid = await realGrid(name);
  const brimful = filled(grid, neighbours, ...(name === 'etopo60' ? [deepestOnly(grid)] : []));
  const { levelM, measures, depressions } = brimful;

  it('has the recorded brim level in every cell', () => {
    for (const [cell, level] of recorded.sample)
      expect(levelM[cell], `cell ${cell}`).toBe(Math.fround(level));
    expect(createHash('sha256').update(levelM).digest('hex')).toBe(recorded.levelSha256);
  });

  it('has outermost ponds that are the connected pieces of {level > z}', () => {
    const ponds = firstCells(pondOfCells(grid, brimful.survey, brimful.drainage, depressions, false));
    expect(ponds.length).toBe(recorded.ponds.count);
    expect(outermost(brimful).length).toBe(recorded.ponds.count);
    const packed = new Float64Array(
      ponds.flatMap(([node, first]) => [first, measures.cells[node], depressions.spillElevationM[node]]),
    );
    expect(createHash('sha256').update(packed).digest('hex')).toBe(recorded.ponds.sha256);
    const byFirstCell = new Map(ponds.map(([node, first]) => [first, node]));
    for (const { firstCell, cells, levelM: level } of recorded.ponds.largest) {
      const node = byFirstCell.get(firstCell) ?? -1;
      expect(measures.cells[node]).toBe(cells);
      expect(depressions.spillElevationM[node]).toBe(Math.fround(level));
    }
  });

  it('has a total capacity equal to the sum over cells', () => {
    const nodes = outermost(brimful);
    const expected =
      recorded.capacityM3 ??
      (recorded.rowDepthSumsM ?? []).reduce((sum, depthM, row) => sum + depthM * grid.metrics.areaM2[row], 0);
    const total = nodes.reduce((sum, node) => sum + measures.capacityM3[node], 0);
    expect(Math.abs(total / expected - 1)).toBeLessThan(1e-12);
    expect(nodes.reduce((sum, node) => sum + measures.cells[node], 0)).toBe(recorded.wetCells);
  });
});

/** Pairs of pond and its first cell in row order. */
function firstCells(pondOfCell: Int32Array): [node: number, cell: number][] {
  const first = new Map<number, number>();
  pondOfCell.forEach((node, cell) => {
    if (node >= 0 && !first.has(node)) first.set(node, cell);
  });
  return [...first];
}
