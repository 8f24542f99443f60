import fc from 'fast-check';
import { expect, it } from 'vitest';
import { analysisOf } from './analysis.ts';
import { check } from './check.ts';
import { around } from './oracle-grid.ts';
import { type TerrainCase, terrainCases } from './terrain-case.ts';

const cases = terrainCases({ width: 12, height: 11 });

/** The same terrain with other elevations; voids stay. */
function withElevations(terrain: TerrainCase, z: (cell: number) => number): TerrainCase {
  return { ...terrain, z: terrain.z.map((old, cell) => (Number.isNaN(old) ? old : Math.fround(z(cell)))) };
}

it('no level lies below the ground', () => {
  check(2000, cases, (terrain) => {
    const { levelM } = analysisOf(terrain);
    expect(terrain.z.some((z, cell) => levelM[cell] < z)).toBe(false);
  });
});

it('ground raised to its levels keeps them', () => {
  check(2000, cases, (terrain) => {
    const { levelM } = analysisOf(terrain);
    // Ground without any way to an outlet has no level and stays as it is.
    const filled = withElevations(terrain, (cell) =>
      Number.isNaN(levelM[cell]) ? terrain.z[cell] : levelM[cell],
    );
    expect([...analysisOf(filled).levelM]).toEqual([...levelM]);
  });
});

it('higher ground has higher levels, and levels change by no more than the ground', () => {
  const twice = fc.tuple(cases, fc.array(fc.integer({ min: 0, max: 12 }), { minLength: 1, maxLength: 40 }));
  check(2000, twice, ([terrain, rises]) => {
    const raised = withElevations(terrain, (cell) => terrain.z[cell] + rises[cell % rises.length] / 4);
    const before = analysisOf(terrain).levelM;
    const after = analysisOf(raised).levelM;
    const most = raised.z.reduce((m, z, cell) => (Number.isNaN(z) ? m : Math.max(m, z - terrain.z[cell])), 0);
    before.forEach((level, cell) => {
      expect(Number.isNaN(after[cell])).toBe(Number.isNaN(level));
      if (Number.isNaN(level)) return;
      expect(after[cell]).toBeGreaterThanOrEqual(level);
      expect(after[cell] - level).toBeLessThanOrEqual(most);
    });
  });
});

it('levels change by no more than the ground where it rises here and falls there', () => {
  const twice = fc.tuple(cases, fc.array(fc.integer({ min: -12, max: 12 }), { minLength: 1, maxLength: 40 }));
  check(2000, twice, ([terrain, changes]) => {
    const changed = withElevations(terrain, (cell) => terrain.z[cell] + changes[cell % changes.length] / 4);
    const before = analysisOf(terrain).levelM;
    const after = analysisOf(changed).levelM;
    const most = changed.z.reduce(
      (m, z, cell) => (Number.isNaN(z) ? m : Math.max(m, Math.abs(z - terrain.z[cell]))),
      0,
    );
    before.forEach((level, cell) => {
      if (!Number.isNaN(level)) expect(Math.abs(after[cell] - level)).toBeLessThanOrEqual(most);
    });
  });
});

it('levels lie between those of the grid pooled by least and by greatest elevation', () => {
  const pooling = fc.tuple(cases, fc.integer({ min: 2, max: 4 })).filter(([terrain, side]) => {
    // A wrapped pooled grid needs three columns of its own.
    return terrain.z.every((z) => !Number.isNaN(z)) && (!terrain.wraps || terrain.width > 2 * side);
  });
  check(2000, pooling, ([drawn, side]) => {
    const terrain: TerrainCase = { ...drawn, edges: 'open', outlets: [], madePits: [], metrics: 'square' };
    const width = Math.ceil(terrain.width / side);
    const blockOf = (cell: number): number =>
      Math.floor(Math.floor(cell / terrain.width) / side) * width + Math.floor((cell % terrain.width) / side);
    const pooled = (choose: (a: number, b: number) => number): Float32Array => {
      const z: number[] = [];
      terrain.z.forEach((value, cell) => {
        const block = blockOf(cell);
        z[block] = z[block] === undefined ? value : choose(z[block], value);
      });
      return analysisOf({ ...terrain, width, height: Math.ceil(terrain.height / side), z }).levelM;
    };
    const lower = pooled(Math.min);
    const upper = pooled(Math.max);
    analysisOf(terrain).levelM.forEach((level, cell) => {
      if (Number.isNaN(level)) return;
      expect(lower[blockOf(cell)]).toBeLessThanOrEqual(level);
      expect(upper[blockOf(cell)]).toBeGreaterThanOrEqual(level);
    });
  });
});

it('made pits change no level and have a catchment of their own', () => {
  check(2000, cases, (terrain) => {
    const plain = analysisOf({ ...terrain, madePits: [] });
    const made = analysisOf(terrain);
    expect([...made.levelM]).toEqual([...plain.levelM]);
    for (const cell of terrain.madePits) {
      const leaf = made.survey.leaf[cell];
      expect(made.survey.pitCell[leaf]).toBe(cell);
      // What has it for its one lower neighbour runs to it.
      for (const other of around(terrain, cell, terrain.neighbours)) {
        const lower = around(terrain, other, terrain.neighbours).filter(
          (n) => terrain.z[n] < terrain.z[other],
        );
        if (lower.length !== 1 || lower[0] !== cell || terrain.madePits.includes(other)) continue;
        expect(made.survey.leaf[other]).toBe(leaf);
      }
    }
  });
});
