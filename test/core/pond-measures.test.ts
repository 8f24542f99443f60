import { describe, expect, it } from 'vitest';
import { analysisOf, pondsOf } from './property/analysis.ts';
import { check } from './property/check.ts';
import { type TerrainCase, terrainCases } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

function measured(text: string, given: Partial<TerrainCase> = {}) {
  const terrain = terrainFromText(text, { edges: 'closed', ...given });
  const found = analysisOf(terrain);
  return pondsOf(found).map(({ node }) =>
    (['cells', 'areaM2', 'capacityM3', 'catchmentAreaM2', 'contributingAreaM2', 'touchesEdge'] as const).map(
      (name) => found.measures[name][node],
    ),
  );
}

// Expected sizes are counted on the profiles by hand.
describe('sizes of ponds', () => {
  const text = '9 1 5 2 4 0';
  const outlets = [{ cell: 5, levelM: -9 }];

  it('count cells, area, capacity, own and contributing ground', () => {
    // The 9 and the 5 run to the 1; the 2 gets its own cell and what spills from the 1; the 4 runs to the 0.
    expect(measured(text, { outlets })).toEqual([
      [1, 1, 2, 1, 4, 1],
      [1, 1, 4, 3, 3, 1],
    ]);
  });

  it("grow with the cells' area", () => {
    const [second, first] = measured(text, { outlets, metrics: 'oblong' });
    expect(second[1]).toBeCloseTo(1.05, 12);
    expect(second[2]).toBeCloseTo(2.1, 12);
    expect(first[2]).toBeCloseTo(4.2, 12);
  });

  it('of a nested pond and of the one that holds it', () => {
    expect(measured('9 1 4 2 7 0', { outlets })).toEqual([
      [1, 1, 3, 3, 3, 1],
      [1, 1, 2, 1, 1, 1],
      [3, 3, 14, 4, 4, 1],
    ]);
  });
});

it('water surface, own ground, contributing ground and the whole terrain hold one another in this order', () => {
  check(1000, terrainCases({ width: 9, height: 8 }), (terrain) => {
    const found = analysisOf(terrain);
    const { measures, survey } = found;
    const whole = survey.areaM2.reduce((a, b) => a + b, 0);
    const ponds = pondsOf(found).filter(({ parent }) => parent === -1);
    const own = ponds.reduce((sum, { node }) => sum + measures.catchmentAreaM2[node], 0);
    expect(own).toBeLessThanOrEqual(whole * (1 + 1e-12));
    for (const { node } of ponds) {
      expect(measures.contributingAreaM2[node]).toBeGreaterThanOrEqual(
        measures.catchmentAreaM2[node] * (1 - 1e-12),
      );
      expect(measures.catchmentAreaM2[node]).toBeGreaterThanOrEqual(measures.areaM2[node] * (1 - 1e-12));
    }
  });
});
